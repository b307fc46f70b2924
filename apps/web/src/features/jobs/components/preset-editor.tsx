import type { presetBody } from '@farlug/contract/routes';
import type { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Dialog } from '../../../ui/dialog.tsx';
import { Form } from '../../../ui/form.tsx';
import { presetErrors } from '../check-draft.ts';
import { noLimits, type PresetDraft } from '../job-draft.ts';
import { limitsOfPreset } from '../limits-of-preset.ts';
import { limitFields } from '../rows-of-draft.ts';
import { DraftText } from './draft-fields.tsx';
import { LimitFigures } from './limits-section.tsx';

type PresetBody = z.output<typeof presetBody>;

const BLANK: PresetDraft = {
  name: '',
  limitBasis: '',
  limitForce: 'recommendation',
  includeService: false,
  includeTransformer: false,
  includeSource: false,
  longRun: false,
  limits: noLimits(),
  byClass: [],
  atVolts: [],
};

const draftOf = (preset: PresetBody): PresetDraft => ({ name: preset.name, ...limitsOfPreset(preset) });

const bodyOf = (draft: PresetDraft): PresetBody => ({
  name: draft.name.trim(),
  clause: draft.limitBasis.trim(),
  force: draft.limitForce,
  includeService: draft.includeService,
  includeTransformer: draft.includeTransformer,
  includeSource: draft.includeSource,
  longRun: draft.longRun,
  limits: limitFields(draft),
});

interface PresetEditorProps {
  preset: PresetBody | null;
  onClose: () => void;
  save: (body: PresetBody) => Promise<ApiError | null>;
}

export function PresetEditor({ preset, onClose, save }: PresetEditorProps) {
  const form = useForm({
    initial: preset ? draftOf(preset) : BLANK,
    check: presetErrors,
    submit: (draft) => save(bodyOf(draft)),
  });
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => !open && onClose()}
      title={preset ? `Change ${preset.name}` : 'New preset'}
      description="Jobs that took the preset keep their figures."
    >
      <Form
        label="Preset"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Save the preset"
        className="-mx-4"
      >
        <div className="grid gap-3 px-4 desk:grid-cols-2">
          <DraftText form={form} field="name" label="Name" required input={{ maxLength: 200 }} />
          <DraftText form={form} field="limitBasis" label="Clause or house rule" required />
        </div>
        <LimitFigures form={form} />
      </Form>
    </Dialog>
  );
}
