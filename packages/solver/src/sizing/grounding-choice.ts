import type { Job, Run } from '../job/index.ts';
import { groundingConductor } from '../tables/grounding.ts';
import type { CandidateSize } from './candidate-sizes.ts';
import { sizeFamilyOf } from './candidate-sizes.ts';
import type { Floor } from './floor.ts';

export type Grounding =
  | { ok: true; size: string; tableSize: string; upsized: boolean }
  /** Why none is given. */
  | { ok: false; reason: string };

/**
 * Equipment grounding conductor beside each candidate (NEC 250.122): by the breaker, increased in proportion to
 * circular mils from the thinnest size of the same metal and sets that meets the ampacity floor (250.122(B)).
 * None is given where the breaker or the floor is not known, and for mm², whose rules are not held here.
 */
export function groundingChooser(
  job: Job,
  run: Run,
  sizes: readonly CandidateSize[],
  floors: readonly Floor[],
): (candidate: number) => Grounding {
  const { breaker } = run;
  if (sizeFamilyOf(job, run) !== 'awg')
    return () => ({ ok: false, reason: 'not checked here: protective conductors in mm²' });
  if (!breaker) return () => ({ ok: false, reason: 'no breaker is stated' });
  return (candidate) => {
    const own = sizes[candidate]!;
    const floor = floors[candidate]!;
    if (floor.status === 'not-checked') return { ok: false, reason: floor.reasons[0]! };
    const required = sizes.filter(
      (s, i) => s.material === own.material && s.sets === own.sets && floors[i]!.status === 'meets',
    );
    const floorCmil = Math.min(own.cmil, ...required.map((s) => s.cmil));
    const found = groundingConductor({
      breakerAmps: breaker.amps,
      material: own.material,
      floorCmil,
      installedCmil: own.cmil,
      lineCmil: own.cmil,
    });
    return found.ok
      ? { ok: true, size: found.size, tableSize: found.tableSize, upsized: found.upsized }
      : { ok: false, reason: found.message };
  };
}
