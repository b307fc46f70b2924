// Setup file of every test project: what a test prints without having asked for it is a failure.
// A test that expects output replaces the method itself, with vi.spyOn(console, 'error').mockImplementation(…).
import { afterEach, beforeEach } from 'vitest';

const methods = ['debug', 'info', 'log', 'warn', 'error'] as const;
const printed: string[] = [];
const original = { ...console };

function watch(method: (typeof methods)[number]): (...values: unknown[]) => void {
  return (...values) => {
    printed.push(`console.${method}: ${values.map(describe).join(' ')}`);
    original[method](...values);
  };
}

function describe(value: unknown): string {
  return value instanceof Error ? (value.stack ?? value.message) : String(value);
}

beforeEach(() => {
  printed.length = 0;
  for (const method of methods) console[method] = watch(method);
});

afterEach(() => {
  for (const method of methods) console[method] = original[method];
  const lines = printed.splice(0);
  if (lines.length > 0) throw new Error(`unexpected console output:\n${lines.join('\n')}`);
});
