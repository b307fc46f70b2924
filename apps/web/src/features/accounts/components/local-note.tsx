import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';

/** Only where the product was started on its own machine for a look around. */
export function LocalNote() {
  return (
    <p className="mt-6 border-l-3 border-line pl-3 text-grid text-ink-soft">
      This copy runs on your own machine. Its demo accounts are printed where it was started; whatever it
      mails lands in the <Link to={paths.mailbox()}>local mailbox</Link>.
    </p>
  );
}
