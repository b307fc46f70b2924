import { randomUUID } from 'node:crypto';
import {
  firmAudit,
  getFirm,
  inviteMember,
  removeFirmConductor,
  removeMember,
  removePreset,
  saveFirmConductor,
  saveFirmDefaults,
  saveFirmSettings,
  savePreset,
  setMemberRole,
  withdrawInvitation,
} from '@farlug/contract/routes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startTestApi, type TestApi } from './start-test-api.ts';
import { joinFirm, signUpFirm, type TestFirm, type TestMember } from './test-firm.ts';

let api: TestApi;
let firm: TestFirm;
let estimator: TestMember;
let params: { firm: string };
beforeAll(async () => {
  api = await startTestApi();
  firm = await signUpFirm(api);
  estimator = await joinFirm(api, firm, 'estimator');
  params = { firm: firm.firm };
});
afterAll(() => api.close());

const preset = {
  name: 'House rule',
  clause: 'House rule of 2026',
  force: 'recommendation' as const,
  includeService: false,
  includeTransformer: true,
  includeSource: false,
  longRun: false,
  limits: [
    { class: null, kind: 'total' as const, atVolts: null, value: '5' },
    { class: 'lighting' as const, kind: 'branch' as const, atVolts: null, value: '2.5' },
  ],
};
const conductor = {
  name: 'House 10',
  material: 'copper' as const,
  areaMm2: '5.26',
  r: '1.24',
  x: '0.05',
  per: '1000ft' as const,
  temperature: '75',
  ampacity: '35',
  source: 'Data sheet of the maker, 2026',
};

describe('the firm', () => {
  it('keeps settings and starting values for everybody in it', async () => {
    const settings = {
      name: 'Sluice Electric',
      reportHeading: 'Sluice Electric, voltage drop',
      noticeWording: 'Ask the office before you pull.',
      currency: 'CAD',
      lengthUnit: 'm' as const,
      wireUnit: 'mm2' as const,
    };
    expect((await firm.admin.call(saveFirmSettings, { params, body: settings })).body.settings).toEqual(
      settings,
    );
    await firm.admin.call(saveFirmDefaults, { params, body: { a: '1', b: '2' } });
    await firm.admin.call(saveFirmDefaults, { params, body: { b: '3' } });
    const seen = (await estimator.client.call(getFirm, { params })).body;
    expect(seen).toMatchObject({ settings, defaults: { b: '3' }, role: 'estimator' });
    for (const body of [{ a: '1\0' }, { 'a\0': '1' }, { a: '\ud800' }]) {
      const { error } = await firm.admin.call(saveFirmDefaults, { params, body: body as never });
      expect(error).toMatchObject({ code: 'invalid', details: [{ path: expect.stringMatching(/^a/) }] });
    }
    const wrong = { ...settings, currency: 'dollars' };
    expect((await firm.admin.call(saveFirmSettings, { params, body: wrong })).error.details).toEqual([
      { path: 'currency', message: 'Use a three-letter currency code, as USD.' },
    ]);
  });

  it('keeps limit presets with the clause that they come from', async () => {
    const at = { ...params, preset: randomUUID() };
    expect((await firm.admin.call(savePreset, { params: at, body: preset })).body.presets).toEqual([
      { ...preset, id: at.preset },
    ]);
    const fewer = { ...preset, limits: preset.limits.slice(0, 1) };
    expect(
      (await firm.admin.call(savePreset, { params: at, body: fewer })).body.presets[0]?.limits,
    ).toHaveLength(1);
    const unsaid = { ...preset, clause: ' ' };
    expect((await firm.admin.call(savePreset, { params: at, body: unsaid })).error.details[0]).toEqual({
      path: 'clause',
      message: 'Say which clause or house rule the limits come from.',
    });
    expect((await firm.admin.call(removePreset, { params: at })).body.presets).toEqual([]);
    expect((await firm.admin.call(removePreset, { params: at })).error.code).toBe('not_found');
  });

  it('keeps conductors of its own, each name once, with their source', async () => {
    const at = { ...params, conductor: randomUUID() };
    const save = (id: string, body = conductor) =>
      firm.admin.call(saveFirmConductor, { params: { ...params, conductor: id }, body });
    expect((await save(at.conductor)).body.conductors).toEqual([{ ...conductor, id: at.conductor }]);
    expect((await save(at.conductor, { ...conductor, r: '1.25' })).body.conductors[0]?.r).toBe('1.25');
    expect((await save(randomUUID())).error).toMatchObject({ code: 'conflict', details: [{ path: 'name' }] });
    expect((await save(randomUUID(), { ...conductor, source: '' })).error.code).toBe('invalid');
    expect((await firm.admin.call(removeFirmConductor, { params: at })).body.conductors).toEqual([]);
    expect((await firm.admin.call(removeFirmConductor, { params: at })).error.code).toBe('not_found');
  });

  it('writes down who did what, for administrators', async () => {
    const { events } = (await firm.admin.call(firmAudit, { params })).body;
    expect(events).toContainEqual(
      expect.objectContaining({
        person: 'Ada Bream',
        what: 'invited as estimator',
        subject: estimator.email,
      }),
    );
    const oldest = events.at(-1)!;
    expect(oldest.what).toBe('signed the firm up');
    const before = await firm.admin.call(firmAudit, { params, query: { before: oldest.at } });
    expect(before.body.events).toEqual([]);
  });
});

describe('the people', () => {
  it('are invited, listed and withdrawn; no member is invited twice', async () => {
    const invited = await firm.admin.call(inviteMember, {
      params,
      body: { email: 'later@firm.example', role: 'admin' },
    });
    expect(invited.body.invitations).toMatchObject([{ email: 'later@firm.example', role: 'admin' }]);
    const again = await firm.admin.call(inviteMember, {
      params,
      body: { email: 'Later@firm.example', role: 'contractor' },
    });
    expect(again.body.invitations).toMatchObject([{ email: 'later@firm.example', role: 'contractor' }]);
    expect((await estimator.client.call(getFirm, { params })).body.invitations).toEqual([]);
    const at = { ...params, invitation: again.body.invitations[0]!.id };
    expect((await firm.admin.call(withdrawInvitation, { params: at })).body.invitations).toEqual([]);
    expect((await firm.admin.call(withdrawInvitation, { params: at })).error.code).toBe('not_found');
    expect(
      (await firm.admin.call(inviteMember, { params, body: { email: estimator.email, role: 'admin' } })).error
        .code,
    ).toBe('conflict');
    expect(
      (await firm.admin.call(inviteMember, { params, body: { email: 'x', role: 'admin' } })).error.code,
    ).toBe('invalid');
  });

  it('change roles at once, and are gone at once', async () => {
    const { client, id } = await joinFirm(api, firm, 'estimator');
    const at = { ...params, person: id };
    await firm.admin.call(setMemberRole, { params: at, body: { role: 'admin' } });
    expect((await client.call(firmAudit, { params })).status).toBe(200);
    await firm.admin.call(removeMember, { params: at });
    expect((await client.call(getFirm, { params })).status).toBe(404);
    expect((await firm.admin.call(removeMember, { params: at })).error.code).toBe('not_found');
    expect((await firm.admin.call(setMemberRole, { params: at, body: { role: 'admin' } })).error.code).toBe(
      'not_found',
    );
    const wrong = { role: 'owner' as 'admin' };
    expect((await firm.admin.call(setMemberRole, { params: at, body: wrong })).error.code).toBe('invalid');
  });

  it('never lose their last administrator', async () => {
    const at = { ...params, person: firm.adminId };
    expect((await firm.admin.call(removeMember, { params: at })).error.code).toBe('conflict');
    const demoted = await firm.admin.call(setMemberRole, { params: at, body: { role: 'estimator' } });
    expect(demoted.error).toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(/last administrator/),
    });
  });
});
