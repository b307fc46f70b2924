import { alongPaths, type PathTree, type Step } from '../network/index.ts';
import type { Core } from './core.ts';
import { dropAt, meanPercent, type PairDrop } from './drop.ts';
import type { Volts } from './volts.ts';

/** A drop at some terminals, split into its five parts, in percent of nominal. */
export interface Split extends PairDrop {
  /** Where: an index in the network's buses. */
  bus: number;
  sourcePercent: number;
  servicePercent: number;
  transformerPercent: number;
  feederPercent: number;
  branchPercent: number;
}

/** The path from the source to where a circuit begins; what a split adds up. */
export interface Begin {
  bus: number;
  sourceBus: number;
  /** Its service runs and transformers alone. */
  steps: readonly Step[];
}

/** Of a path: the bus where it starts, and its service runs and transformers. Paths that lack them share one list. */
const major = alongPaths<Pick<Begin, 'sourceBus' | 'steps'>>(
  (bus) => ({ sourceBus: bus, steps: [] }),
  (before, step) =>
    step.kind === 'service' || step.kind === 'transformer'
      ? { ...before, steps: [...before.steps, step] }
      : before,
);

/** Where a circuit begins, each with its path; the ones that no source reaches are left out. */
export function beginsOf(core: Core, buses: readonly number[]): Begin[] {
  return buses.flatMap((bus) => {
    const tree: PathTree | null = core.treeOf(bus);
    return tree && tree[bus] !== undefined ? [{ bus, ...major(tree, bus) }] : [];
  });
}

/**
 * Splits the drop of a pair at a bus. `branch` is what is lost since the bus where the circuit begins: the lowest
 * percent where it begins at several that have the pair.
 */
export function splitDrop(
  core: Core,
  volts: Volts,
  drop: PairDrop,
  bus: number,
  begins: readonly Begin[],
): Split {
  const label = core.systemLabel[bus]!;
  const at = (other: number): number => {
    if (core.systemLabel[other] === label) {
      const own = dropAt(core, volts, other, drop.pair);
      if (own) return own.dropPercent;
    }
    return meanPercent(core, volts, other);
  };
  let begin: Begin | null = null;
  let lowest = 0;
  for (const candidate of begins) {
    const there =
      core.systemLabel[candidate.bus] === label ? dropAt(core, volts, candidate.bus, drop.pair) : null;
    if (there && (begin === null || there.dropPercent < lowest)) {
      begin = candidate;
      lowest = there.dropPercent;
    }
  }
  const branchPercent = begin ? drop.dropPercent - lowest : 0;
  const path = begin ?? begins[0] ?? null;
  let servicePercent = 0;
  let transformerPercent = 0;
  for (const step of path?.steps ?? []) {
    const lost = at(step.far) - at(step.near);
    if (step.kind === 'service') servicePercent += lost;
    else transformerPercent += lost;
  }
  const sourcePercent = path ? at(path.sourceBus) : 0;
  // Field by field: headroom asks for thousands of splits, and copying an object costs more than working it out.
  return {
    bus,
    pair: drop.pair,
    volts: drop.volts,
    dropVolts: drop.dropVolts,
    dropPercent: drop.dropPercent,
    sourcePercent,
    servicePercent,
    transformerPercent,
    branchPercent,
    feederPercent: drop.dropPercent - sourcePercent - servicePercent - transformerPercent - branchPercent,
  };
}
