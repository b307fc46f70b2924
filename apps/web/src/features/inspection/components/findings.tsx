import type { ReportDigest } from '@farlug/contract/routes';
import { digitsAgainst, formatFixed } from '@farlug/solver/units';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { Tally, Verdict } from '../../../ui/verdict.tsx';

const percent = (value: number | null, limit: number | null = null): string =>
  value === null ? '' : formatFixed(value, digitsAgainst(value, limit));

/** What the report found: counts by circuit, then what exceeds or is near a limit, worst first. */
export function Findings({ digest }: { digest: ReportDigest }) {
  return (
    <section aria-labelledby="findings">
      <h2 id="findings" className="text-label font-normal text-ink-soft">
        What it found, by circuit
      </h2>
      <div className="my-1">
        <Tally counts={digest.counts} />
      </div>
      {digest.findings.length === 0 ? (
        <p className="text-grid">No circuit exceeds a limit or is near one.</p>
      ) : (
        <Table caption="What exceeds or is near a limit, worst first" stacked>
          <thead>
            <tr>
              <Th className="pl-0!">Circuit</Th>
              <Th>Verdict</Th>
              <Th numeric>Feeder %</Th>
              <Th numeric>Branch %</Th>
              <Th numeric>Total %</Th>
              <Th className="pr-0!">Beyond its limit</Th>
            </tr>
          </thead>
          <tbody>
            {digest.findings.map((finding) => (
              <tr key={`${finding.place} ${finding.load}`}>
                <RowHead className="pl-0!">
                  {finding.place} <span className="font-normal">{finding.serves}</span>
                </RowHead>
                <Td label="Verdict">
                  <Verdict kind={finding.shown} />
                </Td>
                <Td numeric label="Feeder %">
                  {percent(finding.feederPercent)}
                </Td>
                <Td numeric label="Branch %">
                  {percent(finding.branchPercent)}
                </Td>
                <Td numeric label="Total %">
                  {percent(finding.totalPercent, finding.limitPercent)}
                </Td>
                <Td label="Beyond its limit" className="pr-0!">
                  {finding.reasons.join(', ')}
                </Td>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </section>
  );
}
