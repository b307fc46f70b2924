import type { Solution } from '@farlug/solver/job';
import { abs, type Complex, conj, mul, sub } from './complex.ts';
import { type Decimal, sumOf } from './decimal.ts';
import type { Sink } from './equations.ts';
import type { ServedLoad } from './sinks.ts';
import type { Solved } from './solve.ts';

const power = (v: Complex, amps: Complex): Decimal => mul(v, conj(amps)).re;

/** Power of all EMFs, loads and ohms; what diversity gives back counts as load below nothing. */
export const totalsOf = (loads: ServedLoad[], credits: Sink[], shown: Solved): Solution['totals'] => {
  const { voltage } = shown;
  const drawn = loads.flatMap((item) =>
    item.pieces.map((piece) =>
      power(sub(voltage(piece.plus), voltage(piece.minus)), shown.drawnBy(item, piece)),
    ),
  );
  const given = credits.map(({ minus, amps }) => power(voltage(minus), amps).neg());
  const lost = shown.elements.map((element) => abs(shown.through(element)).pow(2).times(element.r));
  const delivered = [...shown.fixed].map(([node, emf]) => power(emf, shown.takenAt(node)));
  return {
    sourceWatts: sumOf(delivered).toNumber(),
    loadWatts: sumOf([...drawn, ...given]).toNumber(),
    lossWatts: sumOf(lost).toNumber(),
    kclResidual: 0,
    iterations: 0,
  };
};
