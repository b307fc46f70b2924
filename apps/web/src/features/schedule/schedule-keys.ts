import type { ShortcutGroup } from '../../ui/shortcuts.tsx';

export const SCHEDULE_KEYS: ShortcutGroup = {
  title: 'Schedule',
  keys: [
    [['↑', '↓', '←', '→'], 'another cell; with Ctrl to the edge'],
    [['Enter'], 'open the cell; take what was typed and go down'],
    [['Tab'], 'take what was typed and go right'],
    [['Esc'], 'leave the cell as it was'],
    [['Space'], 'show the circuit at the side'],
    [['Ctrl', 'C'], 'copy the cell; X cuts, V pastes a block'],
    [['Ctrl', 'D'], 'fill down from the cell above'],
    [['Insert'], 'add a circuit'],
    [['Ctrl', 'Shift', 'D'], 'duplicate the circuit'],
    [['Shift', 'Delete'], 'delete the circuit'],
    [['Ctrl', 'Z'], 'undo'],
    [['Ctrl', 'Y'], 'redo'],
  ],
};
