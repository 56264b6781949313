/** Whether there is room beside and above; a phone folds away what is not the point of a page. */
export const isWide = (): boolean => window.matchMedia("(min-width: 40.01rem)").matches;
