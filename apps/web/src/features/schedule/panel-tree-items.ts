import type { PanelView } from '@farlug/contract/schedule';
import type { VerdictKind } from '../../ui/glyph.tsx';
import type { TreeItem } from '../../ui/rail.tsx';
import type { JobResult } from '../../workers/results.ts';

const RANK: readonly VerdictKind[] = ['over', 'rise', 'unserved', 'near', 'within', 'unjudged'];

/** The worst of a panel's own circuits and its feeder part, and how many share it. */
export function panelVerdict(
  panel: PanelView,
  result: JobResult | null,
): { verdict: VerdictKind | null; count: number } {
  if (!result) return { verdict: null, count: 0 };
  const kinds = panel.circuits.flatMap((circuit) => {
    const figures = result.circuits.get(circuit.id);
    return figures ? [figures.shown] : [];
  });
  const own = result.panels.get(panel.id);
  if (own) kinds.push(own.shown);
  const worst = RANK.find((kind) => kinds.includes(kind)) ?? null;
  const counted = worst === 'over' || worst === 'rise' || worst === 'near' || worst === 'unserved';
  return { verdict: worst, count: counted ? kinds.filter((kind) => kind === worst).length : 0 };
}

/** The panels as they feed each other, with the lines that join them. */
export function panelTreeItems(
  panels: readonly PanelView[],
  result: JobResult | null,
  current: string | null,
  to: (panelId: string) => string,
): TreeItem[] {
  const last = (index: number, depth: number): boolean => {
    for (const later of panels.slice(index + 1)) {
      if (later.depth < depth) return true;
      if (later.depth === depth) return false;
    }
    return true;
  };
  return panels.map((panel, index) => {
    const lines = Array.from({ length: panel.depth }, (_, level): TreeItem['lines'][number] => {
      const ends = last(index, level + 1);
      if (level === panel.depth - 1) return ends ? 'end' : 'branch';
      return ends ? 'none' : 'through';
    });
    const { verdict, count } = panelVerdict(panel, result);
    return {
      id: panel.id,
      to: to(panel.id),
      label: panel.code,
      lines,
      verdict,
      count,
      current: panel.id === current,
    };
  });
}
