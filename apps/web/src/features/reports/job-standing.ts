import type { Scenario } from '@farlug/solver/job';

/** A row that the job leaves out, and the way to it. */
export interface BlockingRow {
  key: string;
  label: string;
  reason: string;
  to: string;
}

/** The job as it stands before the person, from its one replica. */
export interface JobStanding {
  seq: number;
  /** Everything typed has reached the server. */
  saved: boolean;
  archived: boolean;
  scenario: Scenario;
  panels: readonly { id: string; label: string }[];
  leftOut: readonly BlockingRow[];
  /** Why the network cannot be solved, in words; `null` where it can. */
  unsolvable: string | null;
}
