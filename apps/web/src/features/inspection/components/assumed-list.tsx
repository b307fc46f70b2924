import type { RevisionInput } from '@farlug/contract/routes';
import { formatCount } from '../../../lib/format.ts';
import { AssumedMark } from '../../../ui/assumed-mark.tsx';

const FIELD_WORDS: Record<string, string> = {
  length: 'length',
  powerFactor: 'power factor',
  size: 'load',
  raceway: 'raceway',
};

/** Every value that nobody stated, and every size below the ampacity floor with its reason. */
export function AssumedList({ input }: { input: RevisionInput }) {
  const { assumed, overrides } = input;
  return (
    <>
      {overrides.length > 0 && (
        <section aria-label="Below the ampacity floor">
          <h2 className="mb-1 text-label font-normal text-ink-soft">
            Below the ampacity floor, by decision of the firm
          </h2>
          <ul className="text-grid">
            {overrides.map((override) => (
              <li key={override.run}>
                <b>{override.run}</b>: {override.reason}
              </li>
            ))}
          </ul>
        </section>
      )}
      {assumed.length > 0 && (
        <section aria-label="Assumed">
          <details>
            <summary className="min-h-11 content-center text-grid desk:min-h-0">
              {formatCount(assumed.length, 'assumed value')}
            </summary>
            <ul className="mt-1 text-grid desk:columns-2">
              {assumed.map((entry) => (
                <li key={`${entry.kind} ${entry.id} ${entry.field}`}>
                  <b>{entry.id}</b>, {FIELD_WORDS[entry.field] ?? entry.field}:{' '}
                  <AssumedMark>{entry.text}</AssumedMark>
                </li>
              ))}
            </ul>
          </details>
        </section>
      )}
    </>
  );
}
