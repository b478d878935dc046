import { lazy, Suspense, useState } from 'react';
import { StyleSheet, View } from 'react-native';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Text } from '../ui/text';
import { stageModule } from './stage-module';
import type { StageViewProps } from './stage-types';

const StageCanvas = lazy(stageModule);

/** The stage: the body in soft light on its ground, with drafting marks. Fills its parent. */
export function StageView(props: StageViewProps) {
  const { colors } = useTheme();
  const [life, setLife] = useState({ lost: false, key: 0 });
  return (
    <View style={[styles.stage, { backgroundColor: colors.stage }]}>
      {life.lost ? (
        <View style={styles.message}>
          <Text variant="body">
            The picture was lost: the browser took its graphics memory back. The scene is kept.
          </Text>
          <Button label="Draw it again" onPress={() => setLife({ lost: false, key: life.key + 1 })} />
        </View>
      ) : (
        <Suspense
          fallback={
            <Text variant="note" style={styles.message}>
              Setting the stage …
            </Text>
          }
        >
          <StageCanvas key={life.key} {...props} onLost={() => setLife({ ...life, lost: true })} />
        </Suspense>
      )}
      {props.children}
    </View>
  );
}

const styles = StyleSheet.create({
  stage: { flex: 1, overflow: 'hidden', minHeight: 120 },
  message: { padding: 24, gap: 16, alignItems: 'flex-start' },
});
