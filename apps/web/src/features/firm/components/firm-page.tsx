import type { FirmView } from '@farlug/contract/routes';
import type { ReactNode } from 'react';
import { FIRM_PARTS, type FirmPart, paths } from '../../../app/paths.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { ErrorState } from '../../../ui/error-state.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { TabLinks } from '../../../ui/tab-links.tsx';
import type { EditPreset } from '../firm-part.ts';
import { useFirm } from '../hooks/use-firm.ts';
import { useFirmActions } from '../hooks/use-firm-actions.ts';
import { AuditPart } from './audit-part.tsx';
import { ConductorsPart } from './conductors-part.tsx';
import { DefaultsPart } from './defaults-part.tsx';
import { PeoplePart } from './people-part.tsx';
import { PresetsPart } from './presets-part.tsx';
import { TablesPart } from './tables-part.tsx';
import { WordingPart } from './wording-part.tsx';

const PART_WORDS: Record<FirmPart, string> = {
  people: 'People',
  limits: 'Limit presets',
  defaults: 'Defaults',
  wording: 'Report and notices',
  conductors: 'Own conductors',
  tables: 'Tables',
  audit: 'Audit trail',
};

interface FirmPageProps {
  firm: string;
  part: FirmPart;
  self: string;
  mayManage: boolean;
  editPreset: EditPreset;
}

export function FirmPage({ firm, part, self, mayManage, editPreset }: FirmPageProps) {
  const view = useFirm(firm);
  const actions = useFirmActions(firm);
  usePageTitle(PART_WORDS[part], view.data?.settings.name);
  const parts = FIRM_PARTS.filter((name) => name !== 'audit' || mayManage);

  const show = (data: FirmView): ReactNode => {
    const props = { firm: data, actions, mayManage };
    switch (part) {
      case 'people':
        return <PeoplePart {...props} self={self} />;
      case 'limits':
        return <PresetsPart {...props} editPreset={editPreset} />;
      case 'defaults':
        return <DefaultsPart {...props} />;
      case 'wording':
        return <WordingPart {...props} />;
      case 'conductors':
        return <ConductorsPart {...props} />;
      case 'tables':
        return <TablesPart />;
      case 'audit':
        return <AuditPart firm={firm} />;
    }
  };
  return (
    <>
      <PageHeading
        title="Firm"
        aside={view.data?.settings.name}
        detail={mayManage ? undefined : 'Set by your administrator; you can read everything here.'}
      />
      <TabLinks
        label="Parts of the firm"
        links={parts.map((name) => ({ to: paths.firm(firm, name), label: PART_WORDS[name] }))}
      />
      <Scroller label={PART_WORDS[part]} className="min-h-0 flex-1 overflow-auto bg-sheet">
        {view.isPending ? (
          <Skeleton label="Opening the firm" />
        ) : view.isError ? (
          <ErrorState title="The firm could not be opened" onRetry={() => void view.refetch()}>
            {view.error.message}
          </ErrorState>
        ) : (
          show(view.data)
        )}
      </Scroller>
    </>
  );
}
