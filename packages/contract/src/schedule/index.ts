export * from './circuit-fields.ts';
export * from './circuit-form.ts';
export * from './circuit-parts.ts';
export * from './load-va.ts';
export * from './nominal.ts';
export type { PanelFoot } from './panel-foot.ts';
export * from './panel-tree.ts';
export * from './schedule-view.ts';
