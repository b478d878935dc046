import { useEffect, useRef, type ReactNode } from 'react';
import { Modal, Pressable, ScrollView, StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from './button';
import { Text } from './text';

/** A sheet over the page: from below on a phone, at the right on wide windows. Escape and Close put it away. */
export function Sheet({ title, onClose, children }: { title: string; onClose: () => void; children: ReactNode }) {
  const { colors } = useTheme();
  const { wide } = useBreakpoint();
  const close = useRef(onClose);
  useEffect(() => {
    close.current = onClose;
  });
  return (
    <Modal transparent visible animationType="none" onRequestClose={() => close.current()}>
      <View style={[styles.cover, wide ? styles.right : styles.below]}>
        <Pressable aria-label="Close" role="button" style={StyleSheet.absoluteFill} onPress={onClose}>
          <View style={[StyleSheet.absoluteFill, { backgroundColor: colors.ink, opacity: 0.18 }]} />
        </Pressable>
        <View
          role="dialog"
          aria-label={title}
          style={[
            styles.sheet,
            wide ? styles.column : styles.bottom,
            { backgroundColor: colors.page, borderColor: colors.ink },
          ]}
        >
          <View style={styles.head}>
            <Text variant="section" level={2}>
              {title}
            </Text>
            <Button kind="quiet" label="Close" onPress={onClose} />
          </View>
          <ScrollView contentContainerStyle={styles.body}>{children}</ScrollView>
        </View>
      </View>
    </Modal>
  );
}

const styles = StyleSheet.create({
  cover: { flex: 1 },
  right: { alignItems: 'flex-end' },
  below: { justifyContent: 'flex-end' },
  sheet: { maxHeight: '100%' },
  column: { width: 368, height: '100%', borderLeftWidth: 1 },
  bottom: { width: '100%', maxHeight: '85%', borderTopWidth: 1 },
  head: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'center', paddingLeft: 20, minHeight: 56 },
  body: { padding: 20, paddingTop: 0, gap: space.l },
});
