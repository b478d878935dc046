import { useState, type ReactNode } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

/** A section between hairlines; folds to its head and keeps the summary. */
export function Card({
  title,
  summary,
  folds = true,
  children,
}: {
  title: string;
  summary?: string;
  folds?: boolean;
  children: ReactNode;
}) {
  const { colors } = useTheme();
  const [open, setOpen] = useState(true);
  const head = (
    <View style={styles.head}>
      <Text variant="card" level={2}>
        {title}
      </Text>
      {summary ? (
        <Text variant="note" color="ink2" numberOfLines={1}>
          {summary}
        </Text>
      ) : null}
    </View>
  );
  return (
    <View style={[styles.card, { borderBottomColor: colors.hair }]}>
      {folds ? (
        <Pressable
          role="button"
          aria-expanded={open}
          aria-label={`${title}, ${open ? 'fold' : 'unfold'}`}
          onPress={() => setOpen(!open)}
        >
          {head}
        </Pressable>
      ) : (
        head
      )}
      {open || !folds ? <View style={styles.body}>{children}</View> : null}
    </View>
  );
}

const styles = StyleSheet.create({
  card: { borderBottomWidth: 1, paddingHorizontal: 20, paddingVertical: 2 },
  head: { minHeight: 48, flexDirection: 'row', alignItems: 'center', justifyContent: 'space-between', gap: space.m },
  body: { gap: space.s, paddingBottom: 14 },
});
