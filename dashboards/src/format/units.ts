const shown: Record<string, string> = {
  Cel: "°C",
  Ohm: "Ω",
  "l/min": "l/min",
  "%RH": "% RH",
  "/": "",
  "1": "",
  "%": "%",
};

/** A unit as people write it, from its SenML name. */
export const unitText = (unit: string): string => shown[unit] ?? unit;
