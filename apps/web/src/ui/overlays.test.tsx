import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, expect, test, vi } from 'vitest';
import { Dialog } from './dialog.tsx';
import { Menu } from './menu.tsx';
import { type ShortcutGroup, ShortcutProvider, useShortcuts } from './shortcuts.tsx';
import { SideSheet } from './side-sheet.tsx';

afterEach(cleanup);

function Asking() {
  const [open, setOpen] = useState(false);
  return (
    <>
      <button type="button" onClick={() => setOpen(true)}>
        Delete
      </button>
      <Dialog open={open} onOpenChange={setOpen} title="Delete the job?" description="It goes.">
        <input aria-label="Reason" />
      </Dialog>
    </>
  );
}

test('a dialog takes the focus, says what it is, and gives the focus back on Esc', async () => {
  const user = userEvent.setup();
  render(<Asking />);
  await user.click(screen.getByRole('button', { name: 'Delete' }));
  const dialog = screen.getByRole('dialog', { name: 'Delete the job?' });
  expect(dialog.contains(document.activeElement)).toBe(true);
  await user.keyboard('{Escape}');
  expect(screen.queryByRole('dialog')).toBeNull();
  await vi.waitFor(() => expect(document.activeElement?.textContent).toBe('Delete'));
});

test('a menu opens by keyboard, and what is disabled is not chosen', async () => {
  const user = userEvent.setup();
  const archive = vi.fn();
  const remove = vi.fn();
  render(
    <Menu
      label="Actions"
      name="Actions for LP-1"
      items={[
        { label: 'Delete', onSelect: remove, disabled: true },
        { label: 'Archive', onSelect: archive },
      ]}
    />,
  );
  screen.getByRole('button', { name: 'Actions for LP-1' }).focus();
  await user.keyboard('{Enter}{ArrowDown}{Enter}');
  expect(archive).toHaveBeenCalledTimes(1);
  expect(remove).not.toHaveBeenCalled();
});

test('the side sheet leaves the focus in the grid on a desk, and takes it on a phone', async () => {
  const user = userEvent.setup();
  const close = vi.fn();
  const desk = vi.spyOn(window, 'matchMedia').mockReturnValue({
    matches: true,
    addEventListener: () => {},
    removeEventListener: () => {},
  } as unknown as MediaQueryList);
  const sheet = (
    <SideSheet title="LP-2-27" onClose={close}>
      <p>Over.</p>
    </SideSheet>
  );
  const { unmount } = render(sheet);
  const aside = screen.getByRole('complementary', { name: 'LP-2-27' });
  expect(aside.contains(document.activeElement)).toBe(false);
  await user.click(screen.getByRole('button', { name: 'Close' }));
  expect(close).toHaveBeenCalledTimes(1);
  unmount();
  desk.mockReturnValue({
    matches: false,
    addEventListener: () => {},
    removeEventListener: () => {},
  } as unknown as MediaQueryList);
  render(sheet);
  const dialog = screen.getByRole('dialog', { name: 'LP-2-27' });
  expect(dialog.contains(document.activeElement)).toBe(true);
});

const GRID_KEYS: ShortcutGroup = { title: 'Schedule', keys: [[['Ctrl', 'D'], 'fill down']] };
function Place() {
  useShortcuts(GRID_KEYS);
  return <input aria-label="Length" />;
}

test('a question mark shows the keys of the place, but not while something is typed', async () => {
  const user = userEvent.setup();
  render(
    <ShortcutProvider>
      <Place />
    </ShortcutProvider>,
  );
  await user.type(screen.getByLabelText('Length'), '?');
  expect(screen.queryByRole('dialog')).toBeNull();
  (document.activeElement as HTMLElement).blur();
  await user.keyboard('?');
  expect(screen.getByRole('dialog', { name: 'Keys' }).textContent).toContain('fill down');
});
