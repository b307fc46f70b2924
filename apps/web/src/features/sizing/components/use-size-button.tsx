import { useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Message } from '../../../ui/message.tsx';
import { TextArea } from '../../../ui/text-input.tsx';
import type { SizeFigures } from '../../../workers/answer-sizes.ts';
import { sizeText } from '../size-words.ts';
import { useApplySize } from '../use-apply-size.ts';

interface UseSizeButtonProps {
  run: string;
  size: SizeFigures;
  look: 'go' | 'plain';
}

/** Applies a size; below the ampacity floor only with a reason, which is printed wherever the number is. */
export function UseSizeButton({ run, size, look }: UseSizeButtonProps) {
  const apply = useApplySize(run);
  const [asking, setAsking] = useState(false);
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<string | null>(null);
  const name = sizeText(size);
  const take = (why: string | null) => {
    const wrong = apply(size, why);
    setProblem(wrong);
    if (!wrong) setAsking(false);
  };
  return (
    <>
      <Button look={look} onClick={() => (size.needsOverride ? setAsking(true) : take(null))}>
        Use {name}
        {size.needsOverride && '…'}
      </Button>
      {problem && !asking && <Message kind="wrong">{problem}</Message>}
      <Dialog
        open={asking}
        onOpenChange={setAsking}
        title={`${name} is below the ampacity floor`}
        description="Voltage drop does not replace ampacity. The reason is kept with the run and printed wherever its size is."
        actions={
          <>
            <Button
              look="go"
              onClick={() => {
                if (reason.trim() === '') setProblem('Say why this size may be used below the floor.');
                else take(reason.trim());
              }}
            >
              Use it all the same
            </Button>
            <Button onClick={() => setAsking(false)}>Leave it</Button>
          </>
        }
      >
        <ul className="mb-3 text-grid">
          {size.floor.reasons.map((each) => (
            <li key={each}>{each}</li>
          ))}
        </ul>
        <Field label="Reason" hint="Who decided it, and on what ground" error={problem}>
          <TextArea value={reason} maxLength={400} onChange={(event) => setReason(event.target.value)} />
        </Field>
      </Dialog>
    </>
  );
}
