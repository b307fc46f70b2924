import type { RevisionInput } from '@farlug/contract/routes';
import type { Database } from '@farlug/db';
import type { Config } from '../config.ts';
import type { Logger } from '../platform/logger.ts';

/** What a report's printed form says beside its pinned input. */
export interface RevisionFacts {
  revisionNo: number;
  revisionLetter: string;
  sha256: string;
  solverVersion: string;
  issuedAt: string;
  issuedBy: string;
}
export type RenderReport = (
  input: RevisionInput,
  facts: RevisionFacts,
) => Promise<{ bytes: Buffer; pages: number }>;

export interface WorkerDeps {
  config: Pick<Config, 'smtpUrl' | 'mailFrom' | 'publicUrl' | 'linkSecret'>;
  db: Database;
  log: Logger;
  render: RenderReport;
}
