import { Pressable, StyleSheet, View } from 'react-native';
import { stressText } from '../../shared/units';
import type { MaterialPreset } from '../../shared/wire/materials';
import { TARGET } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Empty } from '../ui/states';
import { Text } from '../ui/text';
import { grouped } from './families';

/** Names and stiffness by kind, soft to stiff. */
export function MaterialList({
  materials,
  chosen,
  onChoose,
}: {
  materials: readonly MaterialPreset[];
  chosen: string | null;
  onChoose: (id: string) => void;
}) {
  const { colors } = useTheme();
  if (materials.length === 0) {
    return (
      <View style={styles.inset}>
        <Empty title="No material has this in its name.">Try a shorter word, such as “foam”.</Empty>
      </View>
    );
  }
  return (
    <View>
      {grouped(materials).map((group) => (
        <View key={group.title}>
          <View style={[styles.head, { borderBottomColor: colors.hair }]}>
            <Text variant="note" color="ink2" level={2} style={styles.title}>
              {group.title}
            </Text>
          </View>
          {group.materials.map((m) => {
            const here = m.id === chosen;
            return (
              <Pressable
                key={m.id}
                role="button"
                aria-pressed={here}
                aria-label={`${m.name}, ${stressText(m.youngsModulus)}`}
                onPress={() => onChoose(m.id)}
                style={[
                  styles.row,
                  {
                    borderBottomColor: colors.hair,
                    borderLeftColor: here ? colors.kelp : 'transparent',
                    backgroundColor: here ? colors.kelpWash : 'transparent',
                  },
                ]}
              >
                <Text variant="dense" style={styles.name}>
                  {m.name}
                </Text>
                <Text variant="quantity" color={here ? 'ink' : 'ink2'}>
                  {stressText(m.youngsModulus)}
                </Text>
              </Pressable>
            );
          })}
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  inset: { paddingHorizontal: 17 },
  head: { paddingHorizontal: 20, paddingTop: 20, paddingBottom: 6, borderBottomWidth: 1 },
  title: { fontWeight: '600' },
  row: {
    minHeight: TARGET,
    flexDirection: 'row',
    alignItems: 'center',
    gap: 12,
    paddingVertical: 6,
    paddingLeft: 17,
    paddingRight: 20,
    borderBottomWidth: 1,
    borderLeftWidth: 3,
  },
  name: { flex: 1, minWidth: 0 },
});
