import { useState, type ReactNode } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { focusRing } from './focus-ring';
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
}

/** One line of a list between hairlines. */
export function Row({ title, note, value, state, lead, onPress, label }: Props) {
  const { colors } = useTheme();
  const [focused, setFocused] = useState(false);
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
      </View>
      {value ? <Text variant="quantity">{value}</Text> : null}
      {state}
    </>
  );
  const style = [styles.row, { borderBottomColor: colors.hair }];
  if (!onPress) return <View style={style}>{content}</View>;
  return (
    <Pressable
      role="link"
      aria-label={label ?? title}
      onPress={onPress}
      onFocus={() => setFocused(true)}
      onBlur={() => setFocused(false)}
      style={[style, focused && focusRing(colors.ink)]}
    >
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
});
