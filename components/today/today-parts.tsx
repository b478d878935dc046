import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Tag } from '../ui/tag';
import { Text } from '../ui/text';

/** A headed list between rules, with how many there are. */
export function Section({ title, count, children }: { title: string; count?: number; children: ReactNode }) {
  const { colors } = useTheme();
  return (
    <View>
      <View style={[styles.head, { borderBottomColor: colors.hair }]}>
        <Text variant="card" level={2}>
          {title}
        </Text>
        {count ? <Text color="ink2">{count}</Text> : null}
      </View>
      {children}
    </View>
  );
}

/** One thing that asks for something, and the one action that answers it. */
export function Need({
  title,
  note,
  tag,
  tagColor,
  action,
  primary = false,
  onPress,
}: {
  title: string;
  note: string;
  tag: string;
  tagColor: 'kelp' | 'apricot';
  action: string;
  primary?: boolean;
  onPress: () => void;
}) {
  const { colors } = useTheme();
  const { wide } = useBreakpoint();
  const button = (
    <Button
      kind={primary ? 'primary' : wide ? 'plain' : 'quiet'}
      label={action}
      hint={title}
      onPress={onPress}
      style={!wide && !primary && styles.flush}
    />
  );
  return (
    <View style={[styles.need, { borderBottomColor: colors.hair }]}>
      <View style={styles.words}>
        <Text variant="strong">{title}</Text>
        <Text variant="note" color="ink2">
          {note}
        </Text>
        <View style={styles.foot}>
          <Tag label={tag} color={tagColor} />
          {wide ? null : button}
        </View>
      </View>
      {wide ? button : null}
    </View>
  );
}

export function Nothing({ children }: { children: ReactNode }) {
  return (
    <Text color="ink2" style={styles.nothing}>
      {children}
    </Text>
  );
}

const styles = StyleSheet.create({
  head: { flexDirection: 'row', alignItems: 'baseline', gap: space.s, paddingBottom: space.m, borderBottomWidth: 1 },
  need: { flexDirection: 'row', alignItems: 'center', gap: space.l, paddingVertical: space.l, borderBottomWidth: 1 },
  words: { flex: 1, minWidth: 0, gap: 2 },
  foot: {
    flexDirection: 'row',
    alignItems: 'center',
    justifyContent: 'space-between',
    minHeight: 28,
    marginTop: space.xs,
  },
  // A quiet word lines up with the edge of the list; its target reaches beyond it.
  flush: { marginRight: -space.m },
  nothing: { paddingVertical: space.m },
});
