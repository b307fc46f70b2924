import tannery from '../../../../../fixtures/jobs/tannery-row.json?url';

/** The job that an empty list offers, as a copy of one's own. */
export const DEMO_JOB_URL: string = tannery;

export async function fetchDemoJob(): Promise<string | null> {
  const response = await fetch(DEMO_JOB_URL).catch(() => null);
  return response?.ok ? response.text() : null;
}
