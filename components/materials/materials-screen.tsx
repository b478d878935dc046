import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import type { MaterialPreset } from '../../shared/wire/materials';
import { queries } from '../api/queries';
import { useSession } from '../api/session';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Field } from '../ui/field';
import { QueryState } from '../ui/query-state';
import { Sheet } from '../ui/sheet';
import { Empty } from '../ui/states';
import { Text } from '../ui/text';
import { grouped, matching } from './families';
import { MaterialDetail } from './material-detail';
import { MaterialList } from './material-list';
import { StiffnessChart } from './stiffness-chart';

/** The presets: list, chart and source, each following the others. */
export function MaterialsScreen() {
  const { production } = useSession();
  const materials = useQuery(queries.materials(production!.id));
  const { wide } = useBreakpoint();
  return (
    <QueryState query={materials} loading="Fetching the materials …" alone>
      {({ items }) =>
        items.length === 0 ? (
          <View style={styles.padded}>
            <Empty title="No materials yet.">A lead of the production publishes presets.</Empty>
          </View>
        ) : wide ? (
          <Desk materials={items} />
        ) : (
          <Phone materials={items} />
        )
      }
    </QueryState>
  );
}

const softest = (materials: readonly MaterialPreset[]) => grouped(materials)[0]?.materials[0] ?? materials[0]!;

function Desk({ materials }: { materials: readonly MaterialPreset[] }) {
  const { colors } = useTheme();
  const { height } = useBreakpoint();
  const [typed, setTyped] = useState('');
  const [chosen, setChosen] = useState(softest(materials).id);
  const material = materials.find((m) => m.id === chosen) ?? softest(materials);
  return (
    <View style={styles.desk}>
      <ScrollView style={[styles.list, { borderRightColor: colors.hair }]}>
        <View style={styles.find}>
          <Field label="Find a material" value={typed} onChangeText={setTyped} placeholder="rubber, foam, gelatin …" />
        </View>
        <MaterialList materials={matching(materials, typed)} chosen={material.id} onChoose={setChosen} />
      </ScrollView>
      <ScrollView style={styles.fill} contentContainerStyle={styles.padded}>
        <Text variant="title" level={1}>
          Stiffness against density
        </Text>
        <Text color="ink2" style={styles.lead}>
          Presets with their sources. A scene starts from one and may change its numbers.
        </Text>
        <StiffnessChart
          materials={materials}
          chosen={material.id}
          height={Math.max(420, Math.min(720, height - 230))}
          onChoose={setChosen}
        />
      </ScrollView>
      <ScrollView style={[styles.detail, { borderLeftColor: colors.hair }]} contentContainerStyle={styles.padded}>
        <MaterialDetail material={material} />
      </ScrollView>
    </View>
  );
}

function Phone({ materials }: { materials: readonly MaterialPreset[] }) {
  const { colors } = useTheme();
  const [shown, setShown] = useState<'list' | 'chart'>('list');
  const [typed, setTyped] = useState('');
  const [chosen, setChosen] = useState<string | null>(null);
  const material = materials.find((m) => m.id === chosen) ?? null;
  return (
    <ScrollView contentContainerStyle={styles.phone}>
      <View style={styles.phoneHead}>
        <Text variant="titlePhone" level={1}>
          Materials
        </Text>
        <ChoiceOfFew
          label="Show the materials as"
          value={shown}
          onChange={setShown}
          options={[
            { value: 'list', label: 'List' },
            { value: 'chart', label: 'Chart' },
          ]}
        />
      </View>
      {shown === 'list' ? (
        <>
          <View style={styles.inset}>
            <Field
              label="Find a material"
              value={typed}
              onChangeText={setTyped}
              placeholder="rubber, foam, gelatin …"
            />
          </View>
          <MaterialList materials={matching(materials, typed)} chosen={chosen} onChoose={setChosen} />
          {material ? (
            <Sheet title={material.name} onClose={() => setChosen(null)}>
              <MaterialDetail material={material} titled={false} />
            </Sheet>
          ) : null}
        </>
      ) : (
        <View style={styles.inset}>
          <StiffnessChart materials={materials} chosen={chosen} height={400} onChoose={setChosen} />
          <View style={[styles.below, { borderTopColor: colors.hair }]}>
            <MaterialDetail material={material ?? softest(materials)} />
          </View>
        </View>
      )}
    </ScrollView>
  );
}

const styles = StyleSheet.create({
  desk: { flex: 1, flexDirection: 'row' },
  fill: { flex: 1, minWidth: 0 },
  padded: { padding: space.xl },
  list: { width: 300, flexGrow: 0, borderRightWidth: 1 },
  find: { padding: 20, paddingBottom: 0 },
  detail: { width: 348, flexGrow: 0, borderLeftWidth: 1 },
  lead: { marginTop: space.xs, marginBottom: space.l },
  phone: { paddingVertical: space.l, gap: space.l },
  phoneHead: {
    flexDirection: 'row',
    justifyContent: 'space-between',
    alignItems: 'center',
    paddingHorizontal: space.l,
  },
  inset: { paddingHorizontal: space.l },
  below: { borderTopWidth: 1, paddingTop: space.l, marginTop: space.m },
});
