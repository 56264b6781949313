import type { Reason, Source } from "../api/types";
import { presentReadiness } from "./standing";
import type { NewRun } from "./types";

/** What stands against starting a run now, and whether it can be overridden by this person. */
export interface Obstacles { isReady: boolean; reasons: Reason[]; refusal: string | null }

const certificateReasons = new Set(["certificate", "traceability"]);

/**
 * What the service will say to a start, told before anybody types: a hazard that blocks is not overridden by anybody, a missing,
 * overdue or exceeded certificate not by a technician. The service decides; this only saves a vain attempt.
 */
export function obstaclesOf(source: Source, isCurrent: boolean, mayOverrideCertificates: boolean): Obstacles {
  const { state, reasons } = presentReadiness(source, isCurrent);
  const against = reasons.filter((reason) => reason.blocks);
  const hazards = new Set(source.status.openAlerts.filter((alert) => alert.isHazard && alert.returnedAt === null).map((alert) => alert.code));
  const hazard = against.find((reason) => hazards.has(reason.code));
  const certificate = against.find((reason) => certificateReasons.has(reason.code));
  const refusal =
    hazard !== undefined
      ? "A hazard stands that ends a calibration: nobody can start a run until it is dealt with."
      : certificate !== undefined && !mayOverrideCertificates
        ? "A certificate is missing, overdue or does not cover this temperature: only a quality manager can start a run all the same."
        : null;
  return { isReady: state === "ready", reasons: against, refusal };
}

/** The controller's set point counts as that of a run within this, kelvin; beyond it a reason is asked for. */
const sameSetPointKelvin = 1;

export const isOtherSetPoint = (setPointCelsius: number, controllerCelsius: number | null): boolean =>
  controllerCelsius !== null && Number.isFinite(setPointCelsius) && Math.abs(setPointCelsius - controllerCelsius) > sameSetPointKelvin;

/**
 * Gives each run that is asked for its id: the same for the same facts, however often they are sent, so that a second tap or a
 * lost answer makes no second run; another one as soon as something is different.
 */
export function idGiver(draw: () => string): (facts: Omit<NewRun, "id">) => NewRun {
  let last: { facts: string; id: string } | null = null;
  return (facts) => {
    const text = JSON.stringify(facts);
    last = last?.facts === text ? last : { facts: text, id: draw() };
    return { id: last.id, ...facts };
  };
}

/** A UUID of random bits (RFC 9562, version 4); pages that do not come over https have no other source of one. */
export function drawId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  bytes[6] = (bytes[6]! & 0x0f) | 0x40;
  bytes[8] = (bytes[8]! & 0x3f) | 0x80;
  return [...bytes].map((byte, i) => ([4, 6, 8, 10].includes(i) ? "-" : "") + byte.toString(16).padStart(2, "0")).join("");
}
