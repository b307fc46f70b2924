import { Button } from '../../../ui/button.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';

interface NoPanelsProps {
  readOnly: boolean;
  onPanel: () => void;
  onUpload: () => void;
}

export function NoPanels({ readOnly, onPanel, onUpload }: NoPanelsProps) {
  return (
    <EmptyState
      level="h1"
      title="No panel yet"
      actions={
        !readOnly && (
          <>
            <Button look="go" big onClick={onPanel}>
              Add a panel
            </Button>
            <Button big onClick={onUpload}>
              Upload a schedule
            </Button>
          </>
        )
      }
    >
      A panel is fed from the service, from another panel or through a transformer. Its circuits follow, one
      row each; typed, or from a spreadsheet.
    </EmptyState>
  );
}
