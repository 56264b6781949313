import { useEffect, useState } from "preact/hooks";
import { createToken, listTokens, revokeToken, type Role, type Token } from "../api/access";
import { sentencesOf } from "../api/client";
import { RoleChoice } from "../access/RoleChoice";
import { rolesText } from "../access/roles";
import { me } from "../access/session";
import { clockTime } from "../format/time";
import { Copy } from "../parts/Copy";
import { Dialog } from "../parts/Dialog";
import { Problems } from "../parts/Problems";
import { announcement, now, site } from "../state";

const lifetimes = [
  { days: 30, text: "30 days" },
  { days: 90, text: "90 days" },
  { days: 365, text: "a year" },
];

/** Tokens with which programs speak for their owner. */
export function Tokens() {
  const [tokens, setTokens] = useState<Token[] | null>(null);
  const [value, setValue] = useState<string | null>(null);
  const [roles, setRoles] = useState<Role[]>([]);
  const [problems, setProblems] = useState<string[]>([]);
  const act = async (work: () => Promise<void>, otherwise: string): Promise<void> => {
    try {
      await work();
      setTokens((await listTokens()).items.filter((token) => token.revokedAt === null));
      setProblems([]);
    } catch (failure) {
      setProblems(sentencesOf(failure, otherwise));
    }
  };
  useEffect(() => void act(() => Promise.resolve(), "The tokens could not be read."), []);
  const held = me.value?.roles ?? [];
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <section class="panel" aria-labelledby="tokens-title" id="tokens">
      <h2 id="tokens-title">Tokens for programs</h2>
      <p class="quiet">A program that has a token acts in your name, in those of your roles that you give it. Give each program its own, and revoke what is not used any more.</p>
      {tokens?.length === 0 && <p>You have no token.</p>}
      <ul class="rows">
        {tokens?.map((token) => (
          <li key={token.id} class="row">
            <p>
              <strong>{token.name}</strong>
              <br />
              {rolesText(token.roles)}
            </p>
            <p class="quiet">
              {token.lastUsedAt === null ? "Never used" : `Used ${clockTime(token.lastUsedAt, zone, now.value)}`}
              <br />
              {Date.parse(token.expiresAt) <= now.value ? "Ended" : "Ends"} {clockTime(token.expiresAt, zone, now.value)}
            </p>
            <button
              type="button"
              onClick={() =>
                void act(async () => {
                  await revokeToken(token.id);
                  announcement.value = `Revoked: ${token.name}`;
                }, "The token was not revoked.")
              }
            >
              Revoke<span class="hidden"> {token.name}</span>
            </button>
          </li>
        ))}
      </ul>
      <Problems sentences={problems} />
      <form
        class="controls"
        onSubmit={(event) => {
          event.preventDefault();
          const form = event.currentTarget;
          const fields = new FormData(form);
          void act(async () => {
            const made = await createToken(String(fields.get("token-name")).trim(), held.length === 1 ? [...held] : roles, Number(fields.get("days")));
            setValue(made.value);
            form.reset();
            setRoles([]);
          }, "The token was not made.");
        }}
      >
        <label>
          What for
          <input type="text" name="token-name" autocomplete="off" required maxLength={80} placeholder="for example report script" size={28} />
        </label>
        <label>
          Ends after
          <select name="days">
            {lifetimes.map(({ days, text }) => (
              <option key={days} value={days} selected={days === 90}>
                {text}
              </option>
            ))}
          </select>
        </label>
        {held.length > 1 && <RoleChoice offered={held} chosen={roles} onChange={setRoles} />}
        <button type="submit">Make a token</button>
      </form>
      {value !== null && (
        <Dialog title="Your new token" onClose={() => setValue(null)}>
          <p>
            It is <strong>shown this once</strong>. Keep it where the program reads its secrets; whoever has it acts as <code>{me.value?.name}</code>.
          </p>
          <Copy text={value} label="the token" isBlock />
          <p class="quiet">
            Send it with each request: <code class="command">Authorization: Bearer …</code>
          </p>
          <div class="buttons">
            <button type="button" class="act" onClick={() => setValue(null)}>
              Kept
            </button>
          </div>
        </Dialog>
      )}
    </section>
  );
}
