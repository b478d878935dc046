import type { ReactNode } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

interface Props {
  title: string;
  note?: string;
  /** a quantity at the right, in Mono */
  value?: string;
  /** words at the right */
  state?: ReactNode;
  lead?: ReactNode;
  onPress?: () => void;
  label?: string;
  /** on a phone what stands at the right goes below the words */
  stacks?: boolean;
}

/** One line of a list between hairlines. */
export function Row({ title, note, value, state, lead, onPress, label, stacks = false }: Props) {
  const { colors } = useTheme();
  const { phone } = useBreakpoint();
  const below = stacks && phone;
  const right = (
    <>
      {value ? <Text variant="quantity">{value}</Text> : null}
      {state}
    </>
  );
  const content = (
    <>
      {lead}
      <View style={styles.words}>
        <Text variant="strong" numberOfLines={2}>
          {title}
        </Text>
        {note ? (
          <Text variant="note" color="ink2" numberOfLines={2}>
            {note}
          </Text>
        ) : null}
        {below ? <View style={styles.below}>{right}</View> : null}
      </View>
      {below ? null : right}
    </>
  );
  const style = [styles.row, { borderBottomColor: colors.hair }];
  if (!onPress) return <View style={style}>{content}</View>;
  return (
    <Pressable role="link" aria-label={label ?? title} onPress={onPress} style={style}>
      {content}
    </Pressable>
  );
}

const styles = StyleSheet.create({
  row: {
    minHeight: 56,
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.m,
    paddingVertical: space.s,
    borderBottomWidth: 1,
  },
  words: { flex: 1, minWidth: 0 },
  below: { flexDirection: 'row', alignItems: 'center', justifyContent: 'space-between', marginTop: space.xs },
});
