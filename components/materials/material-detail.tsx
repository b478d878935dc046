import { StyleSheet, View } from 'react-native';
import { figures, stressText } from '../../shared/units';
import type { MaterialPreset } from '../../shared/wire/materials';
import { LAW_WORDS } from '../../shared/words';
import { RADIUS } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Dimension } from '../ui/dimension';
import { Fact } from '../ui/fact';
import { Button } from '../ui/button';
import { Caution } from '../ui/states';
import { Text } from '../ui/text';
import type { PresetStart } from './preset-form';

/** One preset: its numbers, how far they may be off, and where they come from. */
export function MaterialDetail({
  material,
  titled = true,
  onMake,
}: {
  material: MaterialPreset;
  titled?: boolean;
  /** starts a new preset or version from this one */
  onMake?: (start: PresetStart) => void;
}) {
  const { colors } = useTheme();
  const { youngsModulus: value, youngsModulusRange: range } = material;
  return (
    <View style={styles.detail}>
      <View style={styles.head}>
        {titled ? (
          <Text variant="section" level={2} style={styles.name}>
            {material.name}
          </Text>
        ) : null}
        <Text variant="small" color="ink2">
          {`${material.productionId ? 'ours, ' : ''}version ${material.version}`}
        </Text>
      </View>
      {range ? (
        <Dimension
          label="Young’s modulus"
          note="the value in its range"
          value={stressText(value)}
          min={stressText(range[0])}
          max={stressText(range[1])}
          share={Math.log(value / range[0]) / Math.log(range[1] / range[0])}
        />
      ) : (
        <Fact name="Young’s modulus" value={stressText(value)} />
      )}
      <View>
        <Fact name="Density" value={`${figures(material.density, 4)} kg/m³`} />
        <Fact name="Poisson’s ratio" value={figures(material.poissonsRatio)} />
        <Fact name="Law" words={LAW_WORDS[material.law]} />
      </View>
      <Text variant="strong" level={3}>
        Where it comes from
      </Text>
      <View style={[styles.source, { borderColor: colors.hair, backgroundColor: colors.paper }]}>
        <Text variant="note">{sentence(material.source)}</Text>
        <Text variant="note" color="ink2">
          {sentence(material.status)}
        </Text>
      </View>
      {onMake ? (
        <View style={styles.actions}>
          {material.productionId ? (
            <Button
              label="New version"
              onPress={() =>
                onMake({
                  title: `Version ${material.version + 1} of ${material.name}`,
                  values: material,
                  next: material,
                })
              }
            />
          ) : null}
          <Button
            label="Copy"
            hint="Publish a preset of the production that starts from this one"
            onPress={() => onMake({ title: 'Publish a copy', values: { ...material, name: `${material.name}, ours` } })}
          />
        </View>
      ) : null}
      <Caution />
    </View>
  );
}

function sentence(text: string): string {
  const trimmed = text.trim();
  return `${trimmed.charAt(0).toUpperCase()}${trimmed.slice(1)}${/[.!?]$/.test(trimmed) ? '' : '.'}`;
}

const styles = StyleSheet.create({
  actions: { flexDirection: 'row', gap: 8 },
  detail: { gap: 14 },
  head: { flexDirection: 'row', alignItems: 'baseline', justifyContent: 'space-between', gap: 12 },
  name: { flex: 1, minWidth: 0 },
  source: { borderWidth: 1, borderRadius: RADIUS, padding: 12, gap: 6 },
});
