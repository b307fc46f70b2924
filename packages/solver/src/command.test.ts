import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { runCommand } from './command.ts';
import { CAUTION, SCENARIOS } from './job/index.ts';

const fixture = readFileSync(new URL('../../../fixtures/jobs/ridge-cabin.json', import.meta.url), 'utf8');
const run = async (args: string[], file = fixture) => {
  let out = '';
  let err = '';
  const code = await runCommand(args, {
    read: async (name) => {
      if (name === 'gone.json') throw new Error('no such file');
      return file;
    },
    out: (text) => {
      out += text;
    },
    err: (text) => {
      err += text;
    },
  });
  return { code, out, err };
};
const changed = (change: (job: Record<string, never[]>) => void): string => {
  const job = JSON.parse(fixture);
  change(job);
  return JSON.stringify(job);
};

describe('solve', () => {
  it('prints one document alone on standard output, and the cautions beside it', async () => {
    const { code, out, err } = await run(['job.json']);
    expect(code).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ format: 'farlug-solution/1', scenario: 'each-circuit' });
    expect(out.trimEnd()).not.toContain('\n');
    expect(err).toContain(CAUTION);
  });

  it.each(SCENARIOS)('solves %s', async (scenario) => {
    const { code, out } = await run(['-', '--scenario', scenario]);
    expect(code).toBe(0);
    expect(JSON.parse(out).scenario).toBe(scenario);
  });

  it('adds the equations where asked, indented where asked', async () => {
    const { out } = await run(['job.json', '--equations', '--pretty', '--scenario=design']);
    expect(out).toContain('\n  "format": "farlug-solution/1"');
    const { equations } = JSON.parse(out);
    expect(equations.equations[0]).toHaveProperty('text');
    expect(equations.kclResidual).toBeLessThan(1e-9);
  });

  it('refuses a file that it cannot read, or that is no JSON', async () => {
    expect(await run(['gone.json'])).toEqual({
      code: 1,
      out: '',
      err: 'gone.json: cannot be read: no such file\n',
    });
    const { code, out, err } = await run(['-'], '{"format":');
    expect([code, out]).toEqual([1, '']);
    expect(err).toMatch(/^standard input: must be a JSON document: /);
  });

  it('names every problem of a refused file by its place', async () => {
    const file = changed((job) => {
      Object.assign(job.runs![0]!, { length: -1 });
      Object.assign(job.loads![0]!, { colour: 'red' });
    });
    const { code, out, err } = await run(['job.json'], file);
    expect([code, out]).toEqual([1, '']);
    expect(err).toMatch(/^runs\[0\]\.length: must be/m);
    expect(err).toMatch(/^loads\[0\].*colour/m);
  });

  it('says where a network cannot be solved', async () => {
    const file = changed((job) => {
      job.buses!.push({ id: 'island' } as never);
    });
    const { code, out, err } = await run(['job.json'], file);
    expect([code, out]).toEqual([2, '']);
    expect(err).toBe('bus island: has no path to a source: join it to the network or take it out\n');
  });

  it.each([
    [[], 'FILE: is missing'],
    [['a.json', 'b.json'], 'b.json: one job file at a time'],
    [['a.json', '--fast'], '--fast: is not an option'],
    [['a.json', '--scenario', 'noon'], '--scenario: must be one of design, each-circuit'],
  ])('explains %j', async (args, message) => {
    const { code, out, err } = await run(args);
    expect([code, out]).toEqual([64, '']);
    expect(err).toContain(message);
    expect(err).toContain('usage: npm run -s solve -- FILE');
  });
});
