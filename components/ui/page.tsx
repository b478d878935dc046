import type { ReactNode } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { Text } from './text';

/** A page of words and lists: title, one action beside it, the rest below. */
export function Page({
  title,
  lead,
  action,
  children,
}: {
  title: string;
  lead?: string;
  action?: ReactNode;
  children: ReactNode;
}) {
  const { wide } = useBreakpoint();
  return (
    <ScrollView contentContainerStyle={[styles.page, wide && styles.wide]}>
      <View style={styles.head}>
        <View style={styles.title}>
          <Text variant={wide ? 'title' : 'titlePhone'} level={1}>
            {title}
          </Text>
          {lead ? <Text color="ink2">{lead}</Text> : null}
        </View>
        {action}
      </View>
      {children}
    </ScrollView>
  );
}

const styles = StyleSheet.create({
  page: { padding: space.l, paddingBottom: space.huge, gap: space.l },
  wide: { paddingHorizontal: space.huge, paddingTop: space.xxl, maxWidth: 1440, width: '100%', alignSelf: 'center' },
  head: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    justifyContent: 'space-between',
    alignItems: 'flex-end',
    gap: space.m,
  },
  title: { flexShrink: 1, gap: space.xs },
});
