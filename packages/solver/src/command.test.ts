import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { runCommand } from './command.ts';
import { CAUTION, NEUTRAL_CAUTION, SCENARIOS } from './job/index.ts';

const fixture = readFileSync(new URL('../../../fixtures/jobs/ridge-cabin.json', import.meta.url), 'utf8');
const neutralRun: string = JSON.parse(fixture).runs.find((each: { conductors: string[] }) =>
  each.conductors.includes('N'),
).id;
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

  it('adds what-ifs where asked, and the caution of a lost neutral', async () => {
    const { code, out, err } = await run([
      'job.json',
      '--lost-neutral',
      neutralRun,
      '--sensitivities',
      '--load-factor=0.5',
      '--price',
      '0.12',
    ]);
    expect(code).toBe(0);
    const { loads, lostNeutral, sensitivities, losses } = JSON.parse(out);
    expect(lostNeutral).toMatchObject({ run: neutralRun, caution: NEUTRAL_CAUTION });
    expect(lostNeutral.loads).toHaveLength(loads.length);
    expect(sensitivities.loads).toHaveLength(loads.length);
    expect(losses).toMatchObject({ lossFactor: expect.closeTo(0.325, 12), pricePerKwh: '0.12' });
    expect(losses.total.costPerYear).toBeGreaterThan(0);
    expect(err).toContain(`${CAUTION} ${NEUTRAL_CAUTION}`);
  });

  it('counts losses in watts alone where no year is stated, and says nothing of neutrals', async () => {
    const { out, err } = await run(['job.json', '--losses']);
    expect(JSON.parse(out).losses.total).toMatchObject({ kwhPerYear: null, costPerYear: null });
    expect(JSON.parse(out)).not.toHaveProperty('lostNeutral');
    expect(err).not.toContain(NEUTRAL_CAUTION);
  });

  it('says which neutral cannot be lost', async () => {
    const { code, out, err } = await run(['job.json', '--lost-neutral', 'nowhere']);
    expect([code, out]).toEqual([2, '']);
    expect(err).toBe('run nowhere: no run of the job has this id\n');
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
    [['a.json', '--scenario'], '--scenario: must be one of design, each-circuit'],
    [['a.json', '--lost-neutral'], '--lost-neutral: must be the id of a run, is missing'],
    [
      ['a.json', '--load-factor', '1.5'],
      '--load-factor: must be 0 to 1, average load over peak load; is 1.5',
    ],
    [['a.json', '--load-factor='], '--load-factor: must be 0 to 1'],
    [['a.json', '--price', '0.12'], '--price: must stand beside'],
    [['a.json', '--load-factor', '0.5', '--price', 'dear'], '--price: must be 0 to 1000000 per kWh'],
    [['a.json', '--pretty=yes'], '--pretty=yes: is not an option'],
  ])('explains %j', async (args, message) => {
    const { code, out, err } = await run(args);
    expect([code, out]).toEqual([64, '']);
    expect(err).toContain(message);
    expect(err).toContain('usage: npm run -s solve -- FILE');
  });
});
