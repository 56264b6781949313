/** Why this browser cannot take push messages as things are; null where it can. */
export function obstacle(): string | null {
  if (!window.isSecureContext) {
    return "Push messages need TLS: open LabWatch by its https address (setting Web:Certificate), or on the machine itself.";
  }
  if (!("serviceWorker" in navigator) || !("PushManager" in window) || !("Notification" in window)) {
    return "This browser takes push messages only from an installed app, or not at all. On a phone: add LabWatch to the home screen and open it from there.";
  }
  return Notification.permission === "denied" ? "Notifications are blocked for these pages. Allow them in the browser's settings of this site." : null;
}

/** Lets the service worker run, where there can be one. It shows push messages and keeps nothing. */
export function startWorker(): void {
  if (window.isSecureContext && "serviceWorker" in navigator) {
    void navigator.serviceWorker.register("/worker.js").catch(() => undefined);
  }
}

/** Subscribes this browser with the key of the service; asks the person for leave first. */
export async function subscribe(publicKey: string): Promise<PushSubscriptionJSON> {
  if ((await Notification.requestPermission()) !== "granted") {
    throw new Error("Notifications were not allowed.");
  }
  const worker = await navigator.serviceWorker.ready;
  const known = await worker.pushManager.getSubscription();
  const made = known ?? (await worker.pushManager.subscribe({ userVisibleOnly: true, applicationServerKey: bytesOf(publicKey) }));
  return made.toJSON();
}

/** The bytes of base64url. */
export function bytesOf(text: string): Uint8Array<ArrayBuffer> {
  const padded = text.replaceAll("-", "+").replaceAll("_", "/") + "=".repeat((4 - (text.length % 4)) % 4);
  return Uint8Array.from(atob(padded), (letter) => letter.charCodeAt(0));
}

/** A first name for the device, from what the browser says of itself. */
export function deviceName(agent: string): string {
  const system = ["Android", "iPhone", "iPad", "Windows", "Mac OS", "Linux"].find((name) => agent.includes(name));
  return system === undefined ? "This device" : `${system} device`;
}
