import type { Role } from "../api/access";
import { allRoles, roleMeaning, roleWord } from "./roles";

interface RoleChoiceProps { offered?: readonly Role[]; chosen: Role[]; onChange: (roles: Role[]) => void }

/** Which roles somebody has, each with what it is for. */
export function RoleChoice({ offered = allRoles, chosen, onChange }: RoleChoiceProps) {
  return (
    <fieldset class="choice">
      <legend>Roles</legend>
      {offered.map((role) => (
        <label key={role} class="inline">
          <input
            type="checkbox"
            name={role}
            checked={chosen.includes(role)}
            onChange={(event) => onChange(event.currentTarget.checked ? [...chosen, role] : chosen.filter((other) => other !== role))}
          />
          <span>
            {roleWord[role]} <span class="quiet">{roleMeaning[role]}</span>
          </span>
        </label>
      ))}
    </fieldset>
  );
}
