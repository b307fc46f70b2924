import type { FieldErrors } from '../../lib/form-errors.ts';
import { LIMIT_WORDS } from '../../lib/job-words.ts';
import {
  CLASS_LIMITS,
  type JobDraft,
  type LimitsDraft,
  PLAIN_LIMITS,
  type PresetDraft,
  type SourceDraft,
} from './job-draft.ts';
import {
  type Reader,
  readAmps,
  readHertz,
  readOhms,
  readPercent,
  readRatio,
  readShare,
  readVolts,
} from './typed-number.ts';

interface NumberRule {
  read: Reader;
  /** Said where the field may not stay empty. */
  required?: string;
  right: string;
}

/** What is wrong with a typed number and what would be right; `null` is nothing. */
function numberError(text: string, rule: NumberRule): string | null {
  if (text.trim() === '') return rule.required ?? null;
  return rule.read(text).ok ? null : `“${text.trim()}” does not do. ${rule.right}`;
}

const percent: NumberRule = { read: readPercent, right: 'Enter a percent from 0 to 100, as 3.' };
const share: NumberRule = { read: readShare, right: 'Enter a percent from 0 to 200, as 90.' };
const volts: NumberRule = { read: readVolts, right: 'Enter volts above 0 and at most 1,000,000, as 480.' };

const TEXT_FIELDS = [
  'name',
  'address',
  'building',
  'area',
  'codeEdition',
  'authority',
  'permitNumber',
  'limitBasis',
] as const;

/** Everything that is wrong in the form, by the path of its field. */
export function draftErrors(draft: JobDraft): FieldErrors {
  const errors: Record<string, string> = {};
  const note = (path: string, message: string | null) => {
    if (message) errors[path] = message;
  };
  for (const field of TEXT_FIELDS) if (draft[field].length > 400) note(field, 'Use at most 400 characters.');
  if (draft.name.trim() === '') note('name', 'Enter a name for the job, as it stands on the drawings.');
  draft.sources.forEach((source, index) => {
    sourceErrors(source, `sources.${index}`, note);
  });
  note('frequency', frequencyError(draft));
  limitErrors(draft, note);
  return errors;
}

type Note = (path: string, message: string | null) => void;

function limitErrors(draft: LimitsDraft, note: Note): void {
  for (const kind of PLAIN_LIMITS) {
    const rule = LIMIT_WORDS[kind].unit === 'V' ? volts : kind.startsWith('rating') ? share : percent;
    note(`limits.${kind}`, numberError(draft.limits[kind], rule));
  }
  draft.byClass.forEach((entry, index) => {
    for (const kind of CLASS_LIMITS) note(`byClass.${index}.${kind}`, numberError(entry[kind], percent));
    if (draft.byClass.findIndex((other) => other.class === entry.class) < index)
      note(`byClass.${index}.class`, 'This class has its limits above.');
  });
  draft.atVolts.forEach((entry, index) => {
    note(
      `atVolts.${index}.atVolts`,
      numberError(entry.atVolts, { ...volts, required: 'Enter the nominal volts that it holds at, as 120.' }),
    );
    note(
      `atVolts.${index}.value`,
      numberError(entry.value, { ...volts, required: 'Enter the volts at the load, as 110.' }),
    );
  });
}

/** What is wrong with a preset. */
export function presetErrors(draft: PresetDraft): FieldErrors {
  const errors: Record<string, string> = {};
  limitErrors(draft, (path, message) => {
    if (message) errors[path] = message;
  });
  if (draft.name.trim() === '') errors.name = 'Enter a name, as it is to stand in the list.';
  if (draft.limitBasis.trim() === '')
    errors.limitBasis = 'Say which clause or house rule the limits come from.';
  return errors;
}

const isDirect = (source: SourceDraft) => source.system === 'dc-2w';

function frequencyError(draft: JobDraft): string | null {
  const direct = draft.sources.filter(isDirect).length;
  if (direct > 0 && direct < draft.sources.length)
    return 'Direct and alternating current cannot be mixed in one job.';
  if (direct > 0) return null;
  return numberError(draft.frequency, {
    read: readHertz,
    required: 'Enter the frequency, as 60 or 50.',
    right: 'Enter hertz above 0 and at most 1000, as 60 or 50.',
  });
}

function sourceErrors(source: SourceDraft, path: string, note: Note): void {
  note(
    `${path}.volts`,
    numberError(source.volts, { ...volts, required: 'Enter the nominal volts, as 480.' }),
  );
  note(
    `${path}.openVolts`,
    numberError(source.openVolts, { ...volts, right: 'Enter what the meter shows at no load, as 485.' }),
  );
  if (source.strength === 'fault') {
    note(
      `${path}.faultAmps`,
      numberError(source.faultAmps, {
        read: readAmps,
        required: 'Enter the fault current as the utility states it, as 22 kA; or choose another way above.',
        right: 'Enter amps above 0, as 22000 or 22 kA.',
      }),
    );
    note(
      `${path}.faultXOverR`,
      numberError(source.faultXOverR, {
        read: readRatio,
        right: 'Enter a ratio of 0 or more, as 4.',
      }),
    );
  }
  if (source.strength === 'impedance') {
    const ohms: NumberRule = { read: readOhms, right: 'Enter ohms of 0 or more, as 0.004.' };
    note(
      `${path}.impedanceR`,
      numberError(source.impedanceR, { ...ohms, required: 'Enter the resistance of each line, as 0.004.' }),
    );
    note(`${path}.impedanceX`, numberError(source.impedanceX, ohms));
  }
}
