import type { ReactNode } from 'react';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { OutsidePage } from '../../../ui/outside-page.tsx';

export function LinkGone({ again, message }: { again?: ReactNode; message?: string | undefined }) {
  usePageTitle('This link no longer works');
  return (
    <OutsidePage
      title="This link no longer works"
      lead={
        message ??
        'It was used already, has expired, was withdrawn, or was not copied whole from the message.'
      }
    >
      {again ?? <p>Ask whoever sent it for a new one.</p>}
    </OutsidePage>
  );
}
