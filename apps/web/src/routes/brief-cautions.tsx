import { BRIEF_NOTICE } from '@farlug/contract/notices';
import { Link } from 'react-router-dom';
import { paths } from '../app/paths.ts';

/** The cautions in two lines, with the way to all of them. */
export function BriefCautions() {
  return (
    <p className="text-label text-ink-soft">
      {BRIEF_NOTICE} <Link to={paths.about('limits')}>All notices</Link>
    </p>
  );
}
