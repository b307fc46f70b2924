import type { Forest } from './forest.ts';
import type { Rings } from './rings.ts';

/** Steps of a forest that are not a plain run: those in rings, and those with a shunt at or beyond them; ascending. */
export interface SpecialSteps {
  step: Int32Array;
  /** The step that it hangs on: its parent, or the top of its piece of rings. */
  up: Int32Array;
  /** Numbers those with shunts, −1 without. */
  slot: Int32Array;
  /** Unknown of the rings, −1 outside of them. */
  ring: Int32Array;
  slots: number;
  /** Slot by step; empty where there are none. */
  slotOf: Int32Array;
}

/** `at`: steps that have a shunt of their own. */
export function specialSteps(forest: Forest, rings: Rings | null, at: Int32Array): SpecialSteps {
  const { count, near } = forest;
  const slotOf = at.length > 0 ? markBeyond(forest, rings, at) : new Int32Array(0);
  const inRing = rings?.step.length ?? 0;
  let size = inRing;
  let slots = 0;
  for (let k = 0, u = 0; k < slotOf.length - 1; k++) {
    const ring = u < inRing && rings!.step[u] === k;
    if (ring) u++;
    if (slotOf[k]! < 0) continue;
    slotOf[k] = slots++;
    if (!ring) size++;
  }
  const special: SpecialSteps = {
    step: new Int32Array(size),
    up: new Int32Array(size),
    slot: new Int32Array(size).fill(-1),
    ring: new Int32Array(size).fill(-1),
    slots,
    slotOf,
  };
  const add = (i: number, k: number, ring: number) => {
    special.step[i] = k;
    special.up[i] = ring < 0 ? near[k]! : rings!.top[ring]!;
    special.ring[i] = ring;
    if (slots > 0) special.slot[i] = slotOf[k]!;
  };
  if (slots === 0) for (let u = 0; u < inRing; u++) add(u, rings!.step[u]!, u);
  else
    for (let k = 0, i = 0, u = 0; k < count; k++) {
      const ring = u < inRing && rings!.step[u] === k ? u++ : -1;
      if (ring >= 0 || slotOf[k]! >= 0) add(i++, k, ring);
    }
  return special;
}

/** 0 at every step with a shunt at or beyond it and at all steps of a piece with one, −1 elsewhere. */
function markBeyond({ count, near }: Forest, rings: Rings | null, at: Int32Array): Int32Array {
  const mark = new Int32Array(count + 1).fill(-1);
  for (const k of at) mark[k] = 0;
  let u = (rings?.step.length ?? 0) - 1;
  let piece = 0;
  for (let k = count - 1; k >= 0; k--) {
    if (!rings || u < 0 || rings.step[u] !== k) {
      if (mark[k] === 0) mark[near[k]!] = 0;
      continue;
    }
    u--;
    if (rings.firstStep[piece] !== k) continue;
    const { order } = rings.elimination;
    const from = rings.pieces[piece]!;
    const end = rings.pieces[++piece]!;
    let any = false;
    for (let p = from; p < end && !any; p++) any = mark[rings.step[order[p]!]!] === 0;
    if (!any) continue;
    for (let p = from; p < end; p++) mark[rings.step[order[p]!]!] = 0;
    mark[rings.top[order[from]!]!] = 0;
  }
  return mark;
}
