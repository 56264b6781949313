import { useEffect, useState } from "preact/hooks";
import { sentencesOf } from "../api/client";
import { addDevice, listDevices, removeDevice, testDevice, type Device } from "../api/devices";
import { clockTime } from "../format/time";
import { Problems } from "../parts/Problems";
import { announcement, now, site } from "../state";
import { deviceName, obstacle, subscribe } from "./pushing";

/** The person's phones and browsers that hazards and alerts are pushed to. */
export function Devices() {
  const [devices, setDevices] = useState<Device[] | null>(null);
  const [key, setKey] = useState("");
  const [problems, setProblems] = useState<string[]>([]);
  const [said, setSaid] = useState("");
  const act = async (work: () => Promise<string>, otherwise: string): Promise<void> => {
    try {
      setProblems([]);
      setSaid("");
      const done = await work();
      setSaid(done);
      announcement.value = done;
      const list = await listDevices();
      setDevices(list.items);
      setKey(list.publicKey);
    } catch (failure) {
      setProblems(failure instanceof Error && failure.message.startsWith("Notifications") ? [failure.message] : sentencesOf(failure, otherwise));
    }
  };
  useEffect(() => void act(() => Promise.resolve(""), "The devices could not be read."), []);
  const zone = site.value?.timeZone ?? "UTC";
  const hindered = obstacle();
  return (
    <section class="panel" aria-labelledby="devices-title" id="devices">
      <h2 id="devices-title">Phones and browsers that are told</h2>
      <p class="quiet">
        Hazards and alerts are pushed to each of them, sealed so that the push service cannot read them. A phone that is off, silent or out of reach tells nobody: this
        does not replace gas alarms, cut-outs or people on the spot.
      </p>
      {devices?.length === 0 && <p>None yet.</p>}
      <ul class="rows">
        {devices?.map((device) => (
          <li key={device.id} class="row">
            <p>
              <strong>{device.name}</strong>
              <br />
              <span class="quiet">
                by {device.host}, since {clockTime(device.createdAt, zone, now.value)}
              </span>
            </p>
            <button
              type="button"
              onClick={() =>
                void act(async () => {
                  const tested = await testDevice(device.id);
                  return tested.isTaken ? "The push service has taken the test message. Does the device show it?" : `The test message was not taken: ${tested.error ?? "no reason given"}`;
                }, "The test message was not sent.")
              }
            >
              Test<span class="hidden"> {device.name}</span>
            </button>
            <button type="button" onClick={() => void act(async () => (await removeDevice(device.id), `Taken away: ${device.name}`), "The device was not taken away.")}>
              Take away<span class="hidden"> {device.name}</span>
            </button>
          </li>
        ))}
      </ul>
      <Problems sentences={problems} />
      <p role="status">{said}</p>
      {hindered !== null ? (
        <p class="abnormal">{hindered}</p>
      ) : (
        <form
          class="controls"
          onSubmit={(event) => {
            event.preventDefault();
            const name = String(new FormData(event.currentTarget).get("device-name")).trim();
            void act(async () => {
              await addDevice(name, await subscribe(key));
              return `Added: ${name}. Send it a test message now.`;
            }, "This browser could not be subscribed: its push service does not answer, or refuses.");
          }}
        >
          <label>
            Name of this device
            <input type="text" name="device-name" autocomplete="off" required maxLength={80} size={24} value={deviceName(navigator.userAgent)} />
          </label>
          <button type="submit">Push to this device</button>
        </form>
      )}
    </section>
  );
}
