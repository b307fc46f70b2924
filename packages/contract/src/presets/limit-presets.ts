import type { Force, Limits, LoadClass } from '@farlug/solver/job';
import { limitsOf } from '../job/limits-rows.ts';
import type { LimitKind, Row } from '../rows/index.ts';

/**
 * Limits as codes and standards give them, ready to be taken over into a job or a firm's own list. `verified` says
 * how far the figures were seen; a person confirms them against the edition that is adopted.
 */
export interface LimitPreset {
  id: string;
  name: string;
  clause: string;
  edition: string;
  force: Force;
  /** What the code says of its own force, where one word is too little. */
  standing: string;
  verified: string;
  includeService: boolean;
  includeTransformer: boolean;
  includeSource: boolean;
  longRun: boolean;
  limits: Omit<Row<'limit'>, 'id'>[];
}

const limit = (
  kind: LimitKind,
  value: string,
  ofClass: LoadClass | null = null,
): Omit<Row<'limit'>, 'id'> => ({
  class: ofClass,
  kind,
  atVolts: null,
  value,
});
const at = (kind: LimitKind, volts: Record<string, string>): Omit<Row<'limit'>, 'id'>[] =>
  Object.entries(volts).map(([atVolts, value]) => ({ class: null, kind, atVolts, value }));

const FROM_SERVICE_ON = {
  includeService: false,
  includeTransformer: false,
  includeSource: false,
  longRun: false,
};
const FROM_ORIGIN_ON = { ...FROM_SERVICE_ON, includeService: true, includeTransformer: true };
const SEEN = 'retrieved (secondary transcription)';
const PARTLY = 'retrieved in part (secondary transcription), the rest from memory';
const MEMORY = 'from memory';
const INFORMATIVE = 'informative annex; made binding or replaced in several national versions';

export const LIMIT_PRESETS: readonly LimitPreset[] = [
  {
    id: 'nec-notes',
    name: 'NEC informational notes, 3 / 3 / 5 %',
    clause: 'NFPA 70 (NEC), informational notes to 210.19 and 215.2',
    edition: '2017, 2020, 2023; the numbers of the notes differ by edition',
    force: 'recommendation',
    standing: 'informational, not enforceable by 90.5(C) unless adopted locally',
    verified: SEEN,
    ...FROM_SERVICE_ON,
    limits: [limit('feeder', '3'), limit('branch', '3'), limit('total', '5')],
  },
  {
    id: 'nec-647-fixed',
    name: 'NEC 647.4(D)(1), fixed sensitive equipment',
    clause: 'NFPA 70 (NEC) 647.4(D)(1)',
    edition: '2017 to 2023',
    force: 'mandatory',
    standing: 'mandatory for systems under article 647',
    verified: PARTLY,
    ...FROM_SERVICE_ON,
    limits: [limit('branch', '1.5', 'sensitive'), limit('total', '2.5', 'sensitive')],
  },
  {
    id: 'nec-647-cord',
    name: 'NEC 647.4(D)(2), cord-connected sensitive equipment',
    clause: 'NFPA 70 (NEC) 647.4(D)(2): the load taken as 50 % of the branch-circuit rating',
    edition: '2017 to 2023',
    force: 'mandatory',
    standing: 'mandatory for systems under article 647',
    verified: PARTLY,
    ...FROM_SERVICE_ON,
    limits: [limit('branch', '1', 'sensitive'), limit('total', '2', 'sensitive')],
  },
  {
    id: 'nec-695',
    name: 'NEC 695.7, fire pump',
    clause:
      'NFPA 70 (NEC) 695.7(A) and (B): 15 % at the controller while starting, 5 % below the motor’s rating at 115 % of full-load current',
    edition: '2017 to 2023',
    force: 'mandatory',
    standing: 'mandatory; a fire pump needs an engineer',
    verified: PARTLY,
    ...FROM_ORIGIN_ON,
    includeSource: true,
    limits: [limit('starting', '15'), limit('rating-low', '95')],
  },
  {
    id: 'iec-g52-public',
    name: 'IEC 60364-5-52 Annex G, public supply',
    clause:
      'IEC 60364-5-52 Annex G, Table G.52.1 A (525): lighting 3 %, other uses 5 %, 0.005 % more for each metre beyond 100 m, at most 0.5 %',
    edition: '2009',
    force: 'recommendation',
    standing: INFORMATIVE,
    verified: SEEN,
    ...FROM_ORIGIN_ON,
    longRun: true,
    limits: [limit('total', '5'), limit('total', '3', 'lighting')],
  },
  {
    id: 'iec-g52-private',
    name: 'IEC 60364-5-52 Annex G, private supply',
    clause:
      'IEC 60364-5-52 Annex G, Table G.52.1 B: lighting 6 %, other uses 8 %, 0.005 % more for each metre beyond 100 m, at most 0.5 %',
    edition: '2009',
    force: 'recommendation',
    standing: `${INFORMATIVE}; counted from the low-voltage terminals of the supply’s own transformer`,
    verified: SEEN,
    ...FROM_SERVICE_ON,
    includeService: true,
    longRun: true,
    limits: [limit('total', '8'), limit('total', '6', 'lighting')],
  },
  {
    id: 'bs7671-public',
    name: 'BS 7671 Table 4Ab, public supply',
    clause: 'BS 7671 Regulation 525.1, Appendix 4 Table 4Ab (i): lighting 3 %, other uses 5 %',
    edition: '2018',
    force: 'recommendation',
    standing: 'appendix values, taken to satisfy 525',
    verified: PARTLY,
    ...FROM_ORIGIN_ON,
    longRun: true,
    limits: [limit('total', '5'), limit('total', '3', 'lighting')],
  },
  {
    id: 'bs7671-private',
    name: 'BS 7671 Table 4Ab, private supply',
    clause: 'BS 7671 Regulation 525.1, Appendix 4 Table 4Ab (ii): lighting 6 %, other uses 8 %',
    edition: '2018',
    force: 'recommendation',
    standing: 'appendix values, taken to satisfy 525',
    verified: MEMORY,
    ...FROM_SERVICE_ON,
    includeService: true,
    longRun: true,
    limits: [limit('total', '8'), limit('total', '6', 'lighting')],
  },
  {
    id: 'as-nzs-3000',
    name: 'AS/NZS 3000 clause 3.6.2, 5 %',
    clause: 'AS/NZS 3000 clause 3.6.2: between the point of supply and any point of the installation',
    edition: '2018',
    force: 'mandatory',
    standing:
      'mandatory; 7 % where the point of supply is the low-voltage terminals of a substation on the premises',
    verified: MEMORY,
    ...FROM_ORIGIN_ON,
    limits: [limit('total', '5')],
  },
  {
    id: 'csa-8-102',
    name: 'CSA C22.1 Rule 8-102, 3 / 3 / 5 %',
    clause:
      'CSA C22.1 Rule 8-102(1)(b) and (c): from the supply side of the consumer’s service to the point of utilization',
    edition: 'confirm against the provincial edition',
    force: 'mandatory',
    standing: 'mandatory; amended in some provinces',
    verified: SEEN,
    ...FROM_ORIGIN_ON,
    limits: [limit('feeder', '3'), limit('branch', '3'), limit('total', '5')],
  },
  {
    id: 'ashrae-2010',
    name: 'ASHRAE 90.1 up to 2010, 2 / 3 %',
    clause: 'ANSI/ASHRAE/IES 90.1, 8.4.1.1 and 8.4.1.2: at design load',
    edition: '2004, 2007, 2010',
    force: 'mandatory',
    standing: 'mandatory provision where the standard is adopted',
    verified: SEEN,
    ...FROM_SERVICE_ON,
    limits: [limit('feeder', '2'), limit('branch', '3')],
  },
  {
    id: 'ashrae-2016',
    name: 'ASHRAE 90.1 from 2016, 5 % in all',
    clause: 'ANSI/ASHRAE/IES 90.1, 8.4.1: feeders and branch circuits together at design load',
    edition: '2016 and later (addendum c to 2013)',
    force: 'mandatory',
    standing: 'mandatory provision where the standard is adopted',
    verified: SEEN,
    ...FROM_SERVICE_ON,
    limits: [limit('total', '5')],
  },
  {
    id: 'iecc',
    name: 'IECC, 5 % in all',
    clause:
      'International Energy Conservation Code C405.9 (2018), C405.10 (2021): feeders and branch circuits together',
    edition: '2018, 2021; numbering differs by edition',
    force: 'mandatory',
    standing: 'mandatory where adopted',
    verified: PARTLY,
    ...FROM_SERVICE_ON,
    limits: [limit('total', '5')],
  },
  {
    id: 'ansi-c84-1',
    name: 'ANSI C84.1 range A, volts at equipment',
    clause: 'ANSI C84.1 Table 1, range A, utilization voltage',
    edition: '2006 and later',
    force: 'recommendation',
    standing: 'voltage standard: terminal volts, not a drop',
    verified: PARTLY,
    ...FROM_SERVICE_ON,
    limits: [
      ...at('lowest-volts', { 120: '108', 208: '187', 240: '216', 277: '249', 480: '432', 600: '540' }),
      ...at('highest-volts', { 120: '126', 208: '218', 240: '252', 277: '291', 480: '504', 600: '630' }),
    ],
  },
  {
    id: 'nema-mg1',
    name: 'NEMA MG 1, motor terminals',
    clause: 'NEMA MG 1 12.44 and 20.14: 10 % above or below rated volts',
    edition: 'confirm against the edition that is used',
    force: 'recommendation',
    standing: 'equipment standard; needs the rated volts of each motor',
    verified: PARTLY,
    ...FROM_SERVICE_ON,
    limits: [limit('rating-low', '90'), limit('rating-high', '110')],
  },
];

/** The limits of a preset, as a job file states them. */
export function limitsFromPreset(
  preset: Pick<LimitPreset, 'clause' | 'force' | 'limits' | Includes>,
): Limits {
  return limitsOf(preset.limits, { ...preset, limitBasis: preset.clause, limitForce: preset.force });
}
type Includes = 'includeService' | 'includeTransformer' | 'includeSource' | 'longRun';
