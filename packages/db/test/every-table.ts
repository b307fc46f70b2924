import { randomUUID } from 'node:crypto';
import { TENANT_TABLES } from '../src/tables.ts';
import type { TestDatabase } from '../src/testing/index.ts';
import { makeFirm, type TestFirm } from './factories.ts';

/** A firm that has at least one row in every tenant table, put there by the owner. */
export async function fillEveryTable(database: TestDatabase): Promise<TestFirm> {
  const firm = await makeFirm(database.db);
  const ids = {
    f: firm.firmId,
    p: firm.personId,
    ...Object.fromEntries([...'jbcdehilmnrstuvwxyz'].map((name) => [name, randomUUID()])),
  } as Record<string, string>;
  const fill = (text: string) =>
    database.asOwner(text.replace(/\$(\w)/g, (_, name: string) => `'${ids[name]}'`));
  await fill(`insert into invitation values ($f, $i, 'new@alder.example', 'estimator', $p, now(), now())`);
  await fill(
    `insert into limit_preset values ($f, $l, 'House', 'House rule', 'recommendation', false, false, false, false)`,
  );
  await fill(`insert into preset_limit values ($f, $l, 0, null, 'total', null, '5')`);
  await fill(`insert into default_value values ($f, 'powerFactor', '0.9')`);
  const conductor = `'Finch 10', 'copper', '10', '1.8', '0.1', 'km', '70', null, 'maker''s sheet'`;
  await fill(`insert into conductor_row values ($f, $c, ${conductor})`);
  await fill(`insert into audit_event values ($f, $e, now(), $p, 'made', 'firm')`);
  await fill(`insert into job (firm_id, id, name, frequency, basis, angle, length_unit, wire_unit, limit_force,
    include_service, include_transformer, include_source, long_run)
    values ($f, $j, 'Annex', '60', 'impedance', 'nominal', 'ft', 'awg', 'recommendation', false, false, false, false)`);
  await fill(`insert into job_limit values ($f, $j, $l, 1, null, 'total', null, '5')`);
  await fill(`insert into job_verdict values ($f, $j, 0, '0.1.0', 2.5, 0, 0, 1, 0)`);
  await fill(`insert into job_edit values ($f, $j, 1, $e, $p, 'name', '[]')`);
  await fill(`insert into bus values ($f, $j, $b, 1, 'MDP', 'a', null, 'panel')`);
  await fill(`insert into source values ($f, $j, $s, 1, 'service', 'a', $b, '3ph-4w', '208', null, false)`);
  await fill(`insert into panel values ($f, $j, $n, 1, $b, null, null, 'two-column', 42, '{L1}')`);
  await fill(`insert into circuit values ($f, $j, $c, 1, 'a', $n, 'branch')`);
  await fill(`insert into breaker values ($f, $j, $d, 1, $c, 1, null, 1, '20')`);
  await fill(`insert into run (firm_id, job_id, id, code, order_key, kind, from_bus_id, to_bus_id, open, conductors,
    material, sets, temperature_operating, protection, locked)
    values ($f, $j, $r, 'F1', 'a', 'feeder', $b, $b, false, '{L1,N}', 'copper', 1, false, 'general', false)`);
  await fill(`insert into transformer (firm_id, job_id, id, code, order_key, from_bus_id, to_bus_id, connection, "primary", system)
    values ($f, $j, $t, 'T1', 'a', $b, $b, 'delta-wye', 'three-phase', '3ph-4w')`);
  await fill(`insert into "load" (firm_id, job_id, id, code, order_key, bus_id, terminals, size_assumed, power_factor_assumed,
    "leading", behaviour, continuous, class)
    values ($f, $j, $l, 'L1', 'a', $b, 'L1-N', false, false, false, 'current', false, 'lighting')`);
  await fill(`insert into job_conductor values ($f, $j, $c, 1, ${conductor})`);
  await fill(`insert into reading values ($f, $j, $m, 1, $b, 'L1-N', '118.2', null, '2026-11-03T09:20:00Z')`);
  await fill(`insert into draft values ($f, $j, $x, 1, 'run', $r, 'length', 'about ninety')`);
  await fill(
    `insert into revision values ($f, $j, $v, 1, 1, 'design', 'letter', '{}', '{}', '0.1.0', repeat('a', 64), null, 0, 0, 0, $p, now())`,
  );
  await fill(`insert into revision_pdf (firm_id, job_id, revision_id, state) values ($f, $j, $v, 'waiting')`);
  await fill(`insert into delivery (firm_id, job_id, id, revision_id, recipient_name, recipient_email, message, state, message_id,
    queued_by, link_expires_at)
    values ($f, $j, $y, $v, 'R. Osei', 'osei@inspect.example', '', 'queued', '<a@farlug.example>', $p, now())`);
  await fill(
    `insert into decision values ($f, $j, $z, $v, $y, 'no-exceptions', '', '', 'R. Osei', 'Inspector', 'link', null)`,
  );
  for (const table of TENANT_TABLES) {
    const rows = await database.asOwner(`select 1 from "${table}" where firm_id = '${firm.firmId}'`);
    if (rows.length === 0) throw new Error(`fillEveryTable puts no row into ${table}`);
  }
  return firm;
}
