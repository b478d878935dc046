import { useMemo, useState, type ComponentProps } from 'react';
import { View } from 'react-native';
import { fitMaterial, TEST_KINDS, type MaterialFit, type TestKind, type TestPoint } from '../../shared/material-fit';
import {
  likelyExtension,
  readTestSheet,
  STRESS_UNITS,
  testPoints,
  type StressUnit,
  type StretchUnit,
  type TestSheet,
} from '../../shared/test-sheet';
import { figures, stressText } from '../../shared/units';
import type { PresetCreate } from '../../shared/wire/materials';
import { space } from '../theme/tokens';
import { Button } from '../ui/button';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { chooseFile } from '../ui/choose-file';
import { DimensionSlider } from '../ui/dimension-slider';
import { Fact } from '../ui/fact';
import { Sheet } from '../ui/sheet';
import { Caution } from '../ui/states';
import { Text } from '../ui/text';
import { FitPlot } from './fit-plot';

const KIND_WORDS: Record<TestKind, string> = { uniaxial: 'Strip', equibiaxial: 'Both ways', planar: 'Wide sheet' };
/** A first range: rubber laws of one or two constants hold for moderate stretch only. */
const FIRST_RANGE = 1.5;
const MOST_BYTES = 4_000_000;

interface Loaded {
  name: string;
  sheet: TestSheet;
}

/** A tensile test as a table becomes a stiffness: what was read, which law, up to which stretch, how well it fits. */
export function FitSheet({ onClose, onUse }: { onClose: () => void; onUse: (values: Partial<PresetCreate>) => void }) {
  const [loaded, setLoaded] = useState<Loaded | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const [extension, setExtension] = useState<StretchUnit>('stretch');
  const [unit, setUnit] = useState<StressUnit>('MPa');
  const [kind, setKind] = useState<TestKind>('uniaxial');
  const [law, setLaw] = useState<MaterialFit['law']>('neo-hookean');
  const [upTo, setUpTo] = useState(FIRST_RANGE);

  const choose = async () => {
    const file = await chooseFile('.csv,.txt,.tsv,text/csv,text/plain', 'Test sheet');
    if (!file) return;
    try {
      if (file.size > MOST_BYTES) throw new RangeError('The file is larger than 4 MB. Export only the table.');
      const sheet = readTestSheet(await file.text());
      setLoaded({ name: file.name, sheet });
      setExtension(likelyExtension(sheet));
      setFault(null);
    } catch (error) {
      setFault((error as Error).message);
    }
  };
  const made = useMemo(() => {
    if (!loaded) return null;
    try {
      const points: TestPoint[] = testPoints(loaded.sheet, extension, unit).map(([stretch, stress]) => ({
        kind,
        stretch,
        stress,
      }));
      try {
        return { points, fit: fitMaterial(law, points, upTo), fault: null };
      } catch (error) {
        return { points, fit: null, fault: (error as Error).message };
      }
    } catch (error) {
      return { points: [], fit: null, fault: (error as Error).message };
    }
  }, [loaded, extension, unit, kind, law, upTo]);
  const largest = made?.points.length ? Math.max(...made.points.map(({ stretch }) => stretch)) : 0;
  const fit = made?.fit ?? null;
  return (
    <Sheet title="Fit from a test" onClose={onClose}>
      <Text variant="dense" color="ink2">
        A table with two columns: how far it was stretched, and the nominal stress (force over the area at rest). The
        file stays in this browser.
      </Text>
      <Button
        kind={loaded ? 'plain' : 'primary'}
        label={loaded ? 'Choose another file' : 'Choose a table (CSV)'}
        onPress={() => void choose()}
      />
      {fault ? (
        <Text variant="note" color="apricot" role="alert">
          {fault}
        </Text>
      ) : null}
      {loaded ? (
        <>
          <Fact
            name={loaded.name}
            value={`${loaded.sheet.rows.length} rows`}
            note={loaded.sheet.headings ? `${loaded.sheet.headings[0]}; ${loaded.sheet.headings[1]}` : undefined}
          />
          <LabelledChoice
            label="First column"
            value={extension}
            onChange={setExtension}
            options={[
              { value: 'stretch', label: 'Stretch' },
              { value: 'strain', label: 'Strain' },
              { value: 'percent', label: 'Strain, %' },
            ]}
          />
          <LabelledChoice
            label="Second column"
            value={unit}
            onChange={setUnit}
            options={STRESS_UNITS.map(({ value }) => ({ value, label: value }))}
          />
          <LabelledChoice
            label="How it was pulled"
            value={kind}
            onChange={(next) => {
              setKind(next);
              if (next !== 'uniaxial') setLaw('neo-hookean');
            }}
            options={TEST_KINDS.map((value) => ({ value, label: KIND_WORDS[value] }))}
          />
          {kind === 'planar' ? null : (
            <LabelledChoice
              label="Law"
              value={law}
              onChange={setLaw}
              options={[
                { value: 'neo-hookean', label: 'neo-Hookean' },
                { value: 'mooney-rivlin', label: 'Mooney–Rivlin' },
              ]}
            />
          )}
          {largest > 1 ? (
            <DimensionSlider
              label="Fit up to this stretch"
              hint="the wash in the plot"
              value={Math.min(upTo, largest)}
              min={1.05}
              max={Math.max(1.1, largest)}
              step={0.05}
              format={(v) => figures(v)}
              onChange={setUpTo}
            />
          ) : null}
          {made?.fault ? (
            <Text variant="note" color="apricot" role="alert">
              {made.fault}
            </Text>
          ) : null}
          {fit && made ? (
            <View>
              <Text variant="strong">Nominal stress, MPa</Text>
              <FitPlot points={made.points} fit={fit} height={190} />
              <Text variant="strong">Measured less fitted, MPa</Text>
              <FitPlot points={made.points} fit={fit} height={110} residuals />
              <Fact name="Young’s modulus" value={stressText(fit.youngsModulus)} note="three times the shear modulus" />
              {fit.law === 'mooney-rivlin' ? (
                <Fact name="C1, C2" value={`${stressText(fit.c1)}, ${stressText(fit.c2)}`} />
              ) : null}
              <Fact
                name="Explained, R²"
                value={fit.rSquared.toFixed(4)}
                note={`${fit.residuals.length} points, off by ${stressText(fit.rms)} in the mean`}
              />
              <Fact name="Holds up to" value={`stretch ${figures(fit.upTo)}`} note={rangeWords(fit, largest)} />
              {fit.law === 'mooney-rivlin' ? (
                <Text variant="note" color="apricot">
                  One kind of test does not settle C2: it may come out many times too large. Scenes take the stiffness
                  at small stretch.
                </Text>
              ) : null}
            </View>
          ) : null}
          <Button
            kind="primary"
            label="Go on with this stiffness"
            disabledReason={fit ? null : 'There is no fit yet.'}
            onPress={() =>
              fit &&
              onUse({
                youngsModulus: fit.youngsModulus,
                youngsModulusRange: null,
                family: 'rubber',
                poissonsRatio: 0.49,
                source: `${fit.law === 'neo-hookean' ? 'Neo-Hookean' : 'Mooney–Rivlin'} least-squares fit of ${loaded.name} (${KIND_WORDS[kind].toLowerCase()}), stretch up to ${figures(fit.upTo)}, R² ${fit.rSquared.toFixed(4)}, ${fit.residuals.length} points.`,
                status: 'measured, fitted here',
              })
            }
          />
        </>
      ) : null}
      <Caution />
    </Sheet>
  );
}

/** A choice of few under its label. */
function LabelledChoice<T extends string>(props: ComponentProps<typeof ChoiceOfFew<T>>) {
  return (
    <View style={{ gap: space.xs }}>
      <Text variant="strong">{props.label}</Text>
      <ChoiceOfFew {...props} />
    </View>
  );
}

function rangeWords(fit: MaterialFit, largest: number): string {
  if (fit.rSquared < 0.98) return 'The law bends away from the test. Fit a shorter range.';
  return fit.upTo < largest * 0.999
    ? 'Beyond it the test goes on and the law was not asked.'
    : 'That is all of the test.';
}
