export * from './apply-edit.ts';
export * from './edit.ts';
export * from './new-id.ts';
export * from './ops.ts';
export * from './references.ts';
export * from './same-value.ts';
