import { ask, remove, send } from "./client";

/** A browser or installed app that takes push messages. */
export interface Device { id: string; name: string; host: string; createdAt: string }

/** How a test message ended. */
export interface Tested { isTaken: boolean; error: string | null }

export const listDevices = (): Promise<{ publicKey: string; items: Device[] }> => ask("me/devices");
export const addDevice = (name: string, subscription: PushSubscriptionJSON): Promise<Device> =>
  send("me/devices", { name, endpoint: subscription.endpoint, keys: subscription.keys });
export const removeDevice = (id: string): Promise<void> => remove(`me/devices/${encodeURIComponent(id)}`);
export const testDevice = (id: string): Promise<Tested> => send(`me/devices/${encodeURIComponent(id)}/test`, {});

/** The alert that a link in a message leads to. */
export const followLink = (token: string): Promise<{ alert: string }> => ask(`alerts/links/${encodeURIComponent(token)}`);
