import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import type { MaterialPreset } from '../../shared/wire/materials';
import { queries } from '../api/queries';
import { useSession } from '../api/session';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Field } from '../ui/field';
import { QueryState } from '../ui/query-state';
import { Sheet } from '../ui/sheet';
import { Empty } from '../ui/states';
import { Text } from '../ui/text';
import { grouped, matching } from './families';
import { FitSheet } from './fit-sheet';
import { MaterialDetail } from './material-detail';
import { MaterialList } from './material-list';
import { PresetForm, type PresetStart } from './preset-form';
import { StiffnessChart } from './stiffness-chart';

type Making = { kind: 'fit' } | { kind: 'form'; start: PresetStart };
type Whose = 'all' | 'ours';

const NEW: PresetStart = { title: 'Publish a preset', values: {} };

/** The presets: list, chart and source, each following the others; a test sheet or own numbers become a new one. */
export function MaterialsScreen() {
  const { production } = useSession();
  const materials = useQuery(queries.materials(production!.id));
  const { wide } = useBreakpoint();
  const [making, setMaking] = useState<Making | null>(null);
  const [chosen, setChosen] = useState<string | null>(null);
  const room = { chosen, onChoose: setChosen, onMake: setMaking };
  return (
    <>
      <QueryState query={materials} loading="Fetching the materials …" alone>
        {({ items }) =>
          items.length === 0 ? (
            <View style={styles.padded}>
              <Empty title="No materials yet.">A lead of the production publishes presets.</Empty>
            </View>
          ) : wide ? (
            <Desk materials={items} {...room} />
          ) : (
            <Phone materials={items} {...room} />
          )
        }
      </QueryState>
      {making?.kind === 'fit' ? (
        <FitSheet
          onClose={() => setMaking(null)}
          onUse={(values) => setMaking({ kind: 'form', start: { title: 'Publish the fit', values } })}
        />
      ) : null}
      {making?.kind === 'form' ? (
        <PresetForm
          start={making.start}
          onClose={() => setMaking(null)}
          onPublished={(material) => {
            setMaking(null);
            setChosen(material.id);
          }}
        />
      ) : null}
    </>
  );
}

interface Room {
  materials: readonly MaterialPreset[];
  chosen: string | null;
  onChoose: (id: string | null) => void;
  onMake: (making: Making) => void;
}

/** Which presets the list shows. */
function useFilter(materials: readonly MaterialPreset[]) {
  const [typed, setTyped] = useState('');
  const [whose, setWhose] = useState<Whose>('all');
  const ours = materials.filter(({ productionId }) => productionId !== null);
  return {
    shown: matching(whose === 'ours' ? ours : materials, typed),
    controls: (
      <View style={styles.filter}>
        <Field label="Find a material" value={typed} onChangeText={setTyped} placeholder="rubber, foam, gelatin …" />
        {ours.length > 0 ? (
          <ChoiceOfFew
            label="Whose presets"
            value={whose}
            onChange={setWhose}
            options={[
              { value: 'all', label: `All ${materials.length}` },
              { value: 'ours', label: `Ours ${ours.length}` },
            ]}
          />
        ) : null}
      </View>
    ),
  };
}

const softest = (materials: readonly MaterialPreset[]) => grouped(materials)[0]?.materials[0] ?? materials[0]!;

function Desk({ materials, chosen, onChoose, onMake }: Room) {
  const { colors } = useTheme();
  const { height } = useBreakpoint();
  const { shown, controls } = useFilter(materials);
  const material = materials.find((m) => m.id === chosen) ?? softest(materials);
  return (
    <View style={styles.desk}>
      <ScrollView style={[styles.list, { borderRightColor: colors.hair }]}>
        <View style={styles.find}>{controls}</View>
        <MaterialList materials={shown} chosen={material.id} onChoose={onChoose} />
      </ScrollView>
      <ScrollView style={styles.fill} contentContainerStyle={styles.padded}>
        <View style={styles.head}>
          <Text variant="title" level={1} style={styles.title}>
            Stiffness against density
          </Text>
          <Button label="Fit from a test" onPress={() => onMake({ kind: 'fit' })} />
          <Button label="New preset" onPress={() => onMake({ kind: 'form', start: NEW })} />
        </View>
        <Text color="ink2" style={styles.lead}>
          Presets with their sources. A scene starts from one and may change its numbers.
        </Text>
        <StiffnessChart
          materials={materials}
          chosen={material.id}
          height={Math.max(420, Math.min(720, height - 230))}
          onChoose={onChoose}
        />
      </ScrollView>
      <ScrollView style={[styles.detail, { borderLeftColor: colors.hair }]} contentContainerStyle={styles.padded}>
        <MaterialDetail material={material} onMake={(start) => onMake({ kind: 'form', start })} />
      </ScrollView>
    </View>
  );
}

function Phone({ materials, chosen, onChoose, onMake }: Room) {
  const { colors } = useTheme();
  const [view, setView] = useState<'list' | 'chart'>('list');
  const { shown, controls } = useFilter(materials);
  const material = materials.find((m) => m.id === chosen) ?? null;
  const make = (start: PresetStart) => {
    onChoose(null);
    onMake({ kind: 'form', start });
  };
  return (
    <ScrollView contentContainerStyle={styles.phone}>
      <View style={styles.phoneHead}>
        <Text variant="titlePhone" level={1}>
          Materials
        </Text>
        <ChoiceOfFew
          label="Show the materials as"
          value={view}
          onChange={setView}
          options={[
            { value: 'list', label: 'List' },
            { value: 'chart', label: 'Chart' },
          ]}
        />
      </View>
      <View style={[styles.inset, styles.make]}>
        <Button label="Fit from a test" onPress={() => onMake({ kind: 'fit' })} />
        <Button label="New preset" onPress={() => make(NEW)} />
      </View>
      {view === 'list' ? (
        <>
          <View style={styles.inset}>{controls}</View>
          <MaterialList materials={shown} chosen={chosen} onChoose={onChoose} />
          {material ? (
            <Sheet title={material.name} onClose={() => onChoose(null)}>
              <MaterialDetail material={material} titled={false} onMake={make} />
            </Sheet>
          ) : null}
        </>
      ) : (
        <View style={styles.inset}>
          <StiffnessChart materials={materials} chosen={chosen} height={400} onChoose={onChoose} />
          <View style={[styles.below, { borderTopColor: colors.hair }]}>
            <MaterialDetail material={material ?? softest(materials)} onMake={make} />
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
  filter: { gap: space.m },
  head: { flexDirection: 'row', alignItems: 'center', gap: space.s, flexWrap: 'wrap' },
  title: { flex: 1 },
  make: { flexDirection: 'row', gap: space.s },
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
