import { useParams } from 'react-router-dom';
import { FIRM_PARTS } from '../app/paths.ts';
import { useMembership } from '../features/accounts/hooks/use-membership.ts';
import { FirmPage } from '../features/firm/components/firm-page.tsx';
import { PresetEditor } from '../features/jobs/components/preset-editor.tsx';
import { EmptyState } from '../ui/empty-state.tsx';

export function Component() {
  const { part } = useParams();
  const { firmId, person, mayManage } = useMembership();
  const known = FIRM_PARTS.find((name) => name === part);
  if (!known || (known === 'audit' && !mayManage))
    return <EmptyState level="h1" title="There is no such part of the firm." />;
  return (
    <FirmPage
      key={firmId}
      firm={firmId}
      part={known}
      self={person.id}
      mayManage={mayManage}
      editPreset={PresetEditor}
    />
  );
}
