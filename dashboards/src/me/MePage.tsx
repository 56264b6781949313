import { rolesText, whoMay } from "../access/roles";
import { ChangePasswordForm } from "../access/ChangePasswordForm";
import { can, me } from "../access/session";
import type { Permission } from "../api/access";
import { clockTime } from "../format/time";
import { PageHead } from "../shell/PageHead";
import { announcement, now, site } from "../state";
import { Devices } from "./Devices";
import { Sessions } from "./Sessions";
import { Tokens } from "./Tokens";

const doings: [Permission, string][] = [
  ["read", "see sources, readings, assessments and alerts"],
  ["acknowledge", "acknowledge alerts"],
  ["record-runs", "start, end and correct calibration runs"],
  ["revise-records", "revise limits, certificates and installations"],
  ["read-trail", "read the trail"],
  ["manage-accounts", "look after accounts"],
];

/** The person's own page: what they may do, their password, sessions and tokens. */
export function MePage() {
  const person = me.value;
  if (person === null) {
    return null;
  }
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <>
      <PageHead title={person.displayName} />
      <section class="panel" aria-labelledby="may-title">
        <h2 id="may-title">What you may do</h2>
        <p>
          You are signed in as <code>{person.name}</code>, {rolesText(person.roles)}. This session ends {clockTime(person.expiresAt, zone, now.value)} at the latest, sooner where nobody uses it.
        </p>
        <ul class="figures">
          {doings.map(([permission, doing]) => (
            <li key={permission} class={can(permission) ? "" : "quiet"}>
              {can(permission) ? `You may ${doing}.` : `Only ${whoMay(permission)} may ${doing}.`}
            </li>
          ))}
        </ul>
      </section>
      <section class="panel" aria-labelledby="password-title">
        <h2 id="password-title">Password</h2>
        <details>
          <summary>Change the password</summary>
          <ChangePasswordForm currentLabel="Present password" onChanged={() => (announcement.value = "The password is changed. All your other sessions have ended.")} />
        </details>
        <p role="status" class="quiet">
          {announcement.value.startsWith("The password is changed") && announcement.value}
        </p>
      </section>
      <Devices />
      <Sessions />
      <Tokens />
    </>
  );
}
