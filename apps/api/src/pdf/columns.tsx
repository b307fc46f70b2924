import { Text, View } from '@react-pdf/renderer';
import type { ReactNode } from 'react';
import { HAIR, INK, LINE, SOFT } from './theme.ts';

export interface Column {
  key: string;
  label: string;
  /** Points; the column without one takes what is left. */
  width?: number;
  right?: boolean;
  /** Points between it and the column before it, where more than usual. */
  gap?: number;
  /** Its cells hold a drawing beside their text. */
  drawn?: boolean;
}

const cellStyle = ({ width, gap }: Column) => ({
  ...(width === undefined ? { flexGrow: 1, flexShrink: 1, flexBasis: 0 } : { width, flexShrink: 0 }),
  paddingHorizontal: 2.5,
  ...(gap === undefined ? {} : { paddingLeft: gap }),
});
const textStyle = (column: Column) => ({
  ...cellStyle(column),
  textAlign: column.right ? ('right' as const) : ('left' as const),
});

/** A ruled table whose heading stands again on each page that it goes on to. */
export function Columns({ columns, children }: { columns: readonly Column[]; children: ReactNode }) {
  return (
    <View style={{ borderTopWidth: 1, borderTopColor: INK }}>
      <View
        fixed
        style={{
          flexDirection: 'row',
          borderBottomWidth: 0.6,
          borderBottomColor: LINE,
          paddingVertical: 1.5,
        }}
      >
        {columns.map((column) => (
          <Text key={column.key} style={[textStyle(column), { fontSize: 7, color: SOFT }]}>
            {column.label}
          </Text>
        ))}
      </View>
      {children}
    </View>
  );
}

export function Row({
  columns,
  cells,
  idle = false,
}: {
  columns: readonly Column[];
  cells: Readonly<Record<string, ReactNode>>;
  idle?: boolean;
}) {
  return (
    <View
      wrap={false}
      style={{
        flexDirection: 'row',
        alignItems: 'center',
        borderBottomWidth: 0.5,
        borderBottomColor: HAIR,
        paddingVertical: 1.6,
        fontSize: 8,
        lineHeight: 1.2,
        ...(idle ? { color: SOFT } : {}),
      }}
    >
      {columns.map((column) => {
        const cell = cells[column.key];
        return column.drawn ? (
          <View key={column.key} style={cellStyle(column)}>
            {cell}
          </View>
        ) : (
          <Text key={column.key} style={textStyle(column)}>
            {cell}
          </Text>
        );
      })}
    </View>
  );
}
