interface Place {
  row: number;
  column: number;
}
interface Key {
  key: string;
  ctrlKey: boolean;
  metaKey: boolean;
  shiftKey: boolean;
}

const PAGE = 10;

/** Where a key of the grid pattern leads; null for keys that do not move. */
export function moveBy(event: Key, { row, column }: Place, rows: number, columns: number): Place | null {
  const far = event.ctrlKey || event.metaKey;
  const to = (r: number, c: number): Place => ({
    row: Math.min(Math.max(r, 0), rows - 1),
    column: Math.min(Math.max(c, 0), columns - 1),
  });
  switch (event.key) {
    case 'ArrowUp':
      return to(far ? 0 : row - 1, column);
    case 'ArrowDown':
      return to(far ? rows - 1 : row + 1, column);
    case 'ArrowLeft':
      return to(row, far ? 0 : column - 1);
    case 'ArrowRight':
      return to(row, far ? columns - 1 : column + 1);
    case 'Home':
      return to(far ? 0 : row, 0);
    case 'End':
      return to(far ? rows - 1 : row, columns - 1);
    case 'PageUp':
      return to(row - PAGE, column);
    case 'PageDown':
      return to(row + PAGE, column);
    default:
      return null;
  }
}
