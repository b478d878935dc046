import { StyleSheet, View } from 'react-native';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

export interface BlockCell {
  label: string;
  value: string;
  mono?: boolean;
  /** takes a line of its own */
  wide?: boolean;
}

/** The drawing's title block, bottom right of the stage. */
export function TitleBlock({ cells, phone }: { cells: readonly BlockCell[]; phone: readonly BlockCell[] }) {
  const { colors } = useTheme();
  const { wide } = useBreakpoint();
  const shown = wide ? cells : phone;
  return (
    <View
      pointerEvents="none"
      style={[styles.block, wide && styles.wide, { borderColor: colors.ink, backgroundColor: colors.page }]}
    >
      {shown.map((cell) => (
        <View key={cell.label} style={[styles.cell, cell.wide && styles.line, { borderColor: colors.hair }]}>
          <Text variant="block" color="ink2">
            {cell.label}
          </Text>
          <Text variant={cell.mono ? 'quantity' : 'dense'} numberOfLines={1} style={styles.value}>
            {cell.value}
          </Text>
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  block: {
    position: 'absolute',
    right: 0,
    bottom: 0,
    borderTopWidth: 1,
    borderLeftWidth: 1,
    flexDirection: 'row',
    flexWrap: 'wrap',
    overflow: 'hidden',
  },
  wide: { width: 252 },
  cell: {
    paddingHorizontal: 10,
    paddingVertical: 4,
    flexGrow: 1,
    // Lines between cells only: the last column's and row's fall outside the block.
    borderBottomWidth: 1,
    borderRightWidth: 1,
    marginBottom: -1,
    marginRight: -1,
    maxWidth: 252,
  },
  line: { width: '100%' },
  value: { fontWeight: '500' },
});
