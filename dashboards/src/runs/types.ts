/** What a correction changed. */
export interface RunChange { member: string; from: string | null; to: string | null }

export interface RunStep { number: number; at: string; by: string; what: string; reason: string | null; changes: RunChange[] }

/** One use of a source for a calibration, as it stands after its steps. */
export interface Run {
  id: string;
  source: string;
  jobNumber: string;
  item: string;
  setPointCelsius: number;
  band: string | null;
  note: string | null;
  startedAt: string;
  startedBy: string;
  endedAt: string | null;
  endedBy: string | null;
  overrideReason: string | null;
  readinessAtStart: string;
  cancelled: boolean;
  steps: RunStep[];
}

export interface RunPage { items: Run[]; next: string | null }

/** What a run is started with. The id is drawn here: sending the same again adds nothing. */
export interface NewRun { id: string; source: string; jobNumber: string; item: string; setPointCelsius: number; band: string | null; note: string | null; overrideReason: string | null }

/** What is put right; what is left out stays as it is. */
export interface Correction { jobNumber?: string; item?: string; setPointCelsius?: number; band?: string; note?: string; cancelled?: boolean; reason: string }
