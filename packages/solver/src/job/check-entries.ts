import { conductorImpedance } from '../tables/impedance.ts';
import { parseSize } from '../tables/size.ts';
import type { Draft, Report } from './draft.ts';
import { eachOf } from './draft.ts';
import { runAmpacity, runSize } from './run-ratings.ts';
import type { ConductorRow, Limits, Run } from './schema.ts';

/** What can be said of a source, run, transformer or row by itself. */
export function checkEntries(draft: Draft, frequencyHz: number, report: Report): void {
  const rows = draft.conductorRows.filter((row) => row !== undefined);
  eachOf(draft.sources, (source, i) => {
    if (source.impedance && source.fault)
      report(`sources[${i}].fault`, 'must not stand beside impedance: state one of the two');
  });
  eachOf(draft.conductorRows, (row, i) => {
    if (parseSize(row.name).ok)
      report(`conductorRows[${i}].name`, `must not be the name of a table size; is "${row.name}"`);
  });
  const sizeProblem = sizeChecker(rows, frequencyHz);
  eachOf(draft.runs, (run, i) => {
    checkRun(run, `runs[${i}]`, sizeProblem, report);
    if (run.temperature === 'operating' && !run.ohms && run.size !== null) {
      const size = runSize(run, rows);
      const ampacity = size && runAmpacity(run, size, null);
      if (ampacity && !ampacity.ok)
        report(`runs[${i}].temperature`, `must be a number where no ampacity is known: ${ampacity.message}`);
    }
  });
  eachOf(draft.transformers, (t, i) => {
    if (t.from === t.to)
      report(`transformers[${i}].to`, `must be another bus than from; both are "${t.from}"`);
  });
  eachOf(draft.panels, (panel, i) => {
    panel.circuits.forEach((circuit, k) => {
      const beyond = circuit.spaces.find((space) => space > panel.spaces);
      if (beyond !== undefined)
        report(
          `panels[${i}].circuits[${k}].spaces`,
          `must be ≤ ${panel.spaces}, the spaces of the panel; has ${beyond}`,
        );
    });
  });
}

type SizeProblem = (size: string, run: Run) => string | null;

const sizeChecker = (rows: readonly ConductorRow[], frequencyHz: number): SizeProblem => {
  const known = new Map<string, string | null>();
  return (size, { material }) => {
    const key = `${material} ${size}`;
    const found = known.get(key);
    if (found !== undefined) return found;
    const z = conductorImpedance({ material, size, raceway: 'pvc', frequencyHz, conductorRows: rows });
    const problem = z.ok ? null : z.message;
    known.set(key, problem);
    return problem;
  };
};

const checkRun = (run: Run, path: string, sizeProblem: SizeProblem, report: Report): void => {
  if (run.from === run.to) report(`${path}.to`, `must be another bus than from; both are "${run.from}"`);
  if (run.ohms) {
    if (run.size !== null) report(`${path}.size`, 'must not stand beside ohms: state one of the two');
    if (run.neutralSize !== null)
      report(`${path}.neutralSize`, 'must not stand beside ohms: state ohms.neutral instead');
  } else if (run.size === null) {
    if (run.length > 0)
      report(`${path}.size`, 'must be a size of the tables, or ohms must be stated; is missing');
  } else {
    const problem = sizeProblem(run.size, run);
    if (problem) report(`${path}.size`, problem);
  }
  if (!run.ohms && run.neutralSize !== null) {
    const problem = sizeProblem(run.neutralSize, run);
    if (problem) report(`${path}.neutralSize`, problem);
  }
  if (run.groundingSize !== null) {
    const size = parseSize(run.groundingSize);
    if (!size.ok) report(`${path}.groundingSize`, size.message);
  }
};

/** Limits that contradict each other, and volts that are no number. */
export function checkLimits(limits: Limits, report: Report): void {
  for (const key of ['lowestVolts', 'highestVolts'] as const) {
    const map = limits[key];
    if (typeof map !== 'object' || map === null) continue;
    for (const nominal of Object.keys(map))
      if (!(Number(nominal) > 0)) report(`limits.${key}.${nominal}`, 'must be nominal volts such as "120"');
  }
  const { lowestVolts, highestVolts, rating } = limits;
  if (typeof lowestVolts === 'number' && typeof highestVolts === 'number' && lowestVolts >= highestVolts)
    report('limits.lowestVolts', `must be < highestVolts, ${highestVolts}; is ${lowestVolts}`);
  if (rating && rating.low !== null && rating.high !== null && rating.low >= rating.high)
    report('limits.rating.low', `must be < high, ${rating.high}; is ${rating.low}`);
}
