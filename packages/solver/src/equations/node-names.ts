import { CONDUCTORS } from '../job/index.ts';
import type { Network } from '../network/index.ts';

/** Names of nodes as equations write them: `LP1.L1`; `MDP.star` for a star point of a transformer's own. */
export function nodeNames({ nodes, buses }: Network) {
  const stars = new Map<number, number>();
  const own = Array.from({ length: nodes.count }, (_, node) => {
    const bus = nodes.busOf[node]!;
    const slot = nodes.slotOf[node]!;
    if (slot >= 0) return `${buses.ids[bus]}.${CONDUCTORS[slot]}`;
    const count = (stars.get(bus) ?? 0) + 1;
    stars.set(bus, count);
    return `${buses.ids[bus]}.star${count > 1 ? count : ''}`;
  });
  const all: string[][] = own.map(() => []);
  for (const [at, node] of nodes.at.entries())
    if (node >= 0) all[node]!.push(`${buses.ids[at >> 2]}.${CONDUCTORS[at & 3]}`);
  return {
    of: (node: number): string => own[node]!,
    /** The other names of a node that runs of no impedance join. */
    also: (node: number): string[] => all[node]!.filter((name) => name !== own[node]),
  };
}
