import { usePageTitle } from '../../../lib/use-page-title.ts';
import { OutsidePage } from '../../../ui/outside-page.tsx';

/** Expired, renewed, withdrawn or cut short: all look the same from outside. */
export function LinkEnded() {
  usePageTitle('This link no longer opens the report');
  return (
    <OutsidePage title="This link no longer opens the report">
      <p>
        It has expired, was replaced by a newer one, was withdrawn by the firm that sent it, or was not copied
        whole from the message.
      </p>
      <p className="mt-3">
        Ask the firm to renew it: the message that brought it says whom. The PDF attached to the message
        stands alone; a decision can be written on it and returned on paper.
      </p>
    </OutsidePage>
  );
}
