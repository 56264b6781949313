import type { Permission, Role } from "../api/access";

export const roleWord: Record<Role, string> = {
  technician: "Technician",
  "quality-manager": "Quality manager",
  auditor: "Auditor",
  administrator: "Administrator",
};

/** What each role is for, as the form for accounts says it. */
export const roleMeaning: Record<Role, string> = {
  technician: "Acknowledges alerts; starts, ends and corrects calibration runs.",
  "quality-manager": "The same; revises limits, certificates and installations; reads the trail.",
  auditor: "Reads everything, the trail too; changes nothing.",
  administrator: "Looks after accounts; reads the trail. May neither acknowledge nor revise.",
};

export const allRoles = Object.keys(roleWord) as Role[];

/** Roles as one line, for example "Technician, Auditor". */
export const rolesText = (roles: readonly Role[]): string =>
  roles.length === 0 ? "no role" : allRoles.filter((role) => roles.includes(role)).map((role) => roleWord[role]).join(", ");

const holders: Record<Permission, readonly Role[]> = {
  read: allRoles,
  acknowledge: ["technician", "quality-manager"],
  "record-runs": ["technician", "quality-manager"],
  "revise-records": ["quality-manager"],
  "read-trail": ["quality-manager", "auditor", "administrator"],
  "manage-accounts": ["administrator"],
  "inject-faults": ["technician", "quality-manager", "administrator"],
};

/** Who may do something, for a sentence: "a technician or a quality manager". */
export function whoMay(permission: Permission): string {
  const names = holders[permission].map((role) => `${/^[aeiou]/i.test(roleWord[role]) ? "an" : "a"} ${roleWord[role].toLowerCase()}`);
  return names.length < 2 ? (names[0] ?? "nobody") : `${names.slice(0, -1).join(", ")} or ${names.at(-1)}`;
}
