import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useFormik } from 'formik';
import { useState } from 'react';
import { StyleSheet, View } from 'react-native';
import * as Yup from 'yup';
import { HARDNESS_SPREAD, modulusFromShoreA, SHORE_A_RANGE } from '../../shared/hardness';
import { figures, stressText } from '../../shared/units';
import { materialPresetSchema, type MaterialPreset, type PresetCreate } from '../../shared/wire/materials';
import { api } from '../api/client';
import { fieldFaults } from '../api/problem';
import { queries } from '../api/queries';
import { useMay, useSession } from '../api/session';
import { Button } from '../ui/button';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Field } from '../ui/field';
import { Sheet } from '../ui/sheet';
import { Caution } from '../ui/states';
import { Text } from '../ui/text';

/** What a new preset starts from: another preset, a fit, or nothing. */
export interface PresetStart {
  title: string;
  values: Partial<PresetCreate>;
  /** the production's own preset that gets its next version */
  next?: { id: string; version: number };
}

const FIELDS = ['name', 'family', 'kilopascals', 'shoreA', 'poissonsRatio', 'density', 'source', 'status'] as const;
type Values = Record<(typeof FIELDS)[number], string> & { from: 'modulus' | 'hardness' };

const number = (what: string) =>
  Yup.number()
    .typeError(`${what} must be a number.`)
    .required(`${what} is missing.`)
    .moreThan(0, `${what} must be greater than 0.`);

const schema = Yup.object({
  name: Yup.string().trim().required('Give the material a name.').max(120, 'At most 120 letters.'),
  family: Yup.string().trim().required('Say what kind of material it is.').max(40, 'At most 40 letters.'),
  kilopascals: Yup.mixed().when('from', {
    is: 'modulus',
    then: () => number('Young’s modulus'),
  }),
  shoreA: Yup.mixed().when('from', {
    is: 'hardness',
    then: () => number('Hardness').lessThan(100, 'Shore A ends below 100.'),
  }),
  poissonsRatio: Yup.number()
    .typeError('Poisson’s ratio must be a number.')
    .required('Poisson’s ratio is missing.')
    .min(0, 'Poisson’s ratio is 0 at least.')
    .max(0.49, 'At 0.5 nothing can change volume. Use 0.49 or less.'),
  density: number('Density'),
  source: Yup.string().trim().required('Say where the numbers come from.').max(2000, 'At most 2000 letters.'),
  status: Yup.string().trim().required('Say how well the source is known.').max(500, 'At most 500 letters.'),
});

/** Publishes a preset of the production, or the next version of one. */
export function PresetForm({
  start,
  onClose,
  onPublished,
}: {
  start: PresetStart;
  onClose: () => void;
  onPublished: (material: MaterialPreset) => void;
}) {
  const { production } = useSession();
  const mayPublish = useMay('lead');
  const client = useQueryClient();
  const [refused, setRefused] = useState<string | null>(null);
  const { values: given, next } = start;
  const publish = useMutation({
    mutationFn: (body: PresetCreate) =>
      next
        ? api.post(`/api/materials/${next.id}/versions`, { ...body, basedOn: next.version }, materialPresetSchema)
        : api.post(`/api/productions/${production!.id}/materials`, body, materialPresetSchema),
    onSuccess: (material) => {
      void client.invalidateQueries({ queryKey: queries.materials(production!.id).queryKey });
      onPublished(material);
    },
  });
  const form = useFormik<Values>({
    initialValues: {
      from: 'modulus',
      name: given.name ?? '',
      family: given.family ?? '',
      kilopascals: given.youngsModulus ? figures(given.youngsModulus / 1000, 6) : '',
      shoreA: '',
      poissonsRatio: String(given.poissonsRatio ?? 0.49),
      density: given.density ? String(given.density) : '',
      source: given.source ?? '',
      status: given.status ?? '',
    },
    validationSchema: schema,
    onSubmit: async (values, { setErrors }) => {
      setRefused(null);
      try {
        await publish.mutateAsync(presetOf(values, given));
      } catch (error) {
        const { byField, rest } = fieldFaults(error, [...FIELDS, 'youngsModulus']);
        setErrors({ ...byField, ...(byField.youngsModulus ? { kilopascals: byField.youngsModulus } : {}) });
        setRefused(rest);
      }
    },
  });
  const { values } = form;
  const field = (name: (typeof FIELDS)[number]) => ({
    value: values[name],
    onChangeText: (text: string) => void form.setFieldValue(name, text),
    onBlur: () => void form.setFieldTouched(name),
    error: form.touched[name] ? (form.errors[name] ?? null) : null,
  });
  const hardness = Number(values.shoreA);
  return (
    <Sheet title={start.title} onClose={onClose}>
      <Field label="Name" {...field('name')} />
      <Field label="Kind" {...field('family')} placeholder="rubber, foam, gel, flesh …" />
      <View style={styles.stiffness}>
        <ChoiceOfFew
          label="Stiffness from"
          value={values.from}
          onChange={(from) => void form.setFieldValue('from', from)}
          options={[
            { value: 'modulus', label: 'Young’s modulus' },
            { value: 'hardness', label: 'Hardness' },
          ]}
        />
        {values.from === 'modulus' ? (
          <Field label="Young’s modulus" unit="kPa" keyboard="decimal-pad" {...field('kilopascals')} />
        ) : (
          <Field
            label="Hardness, Shore A"
            keyboard="decimal-pad"
            {...field('shoreA')}
            note={hardness > 0 && hardness < 100 ? hardnessWords(hardness) : 'Gent 1958 makes a modulus of it.'}
          />
        )}
      </View>
      <Field label="Poisson’s ratio" keyboard="decimal-pad" {...field('poissonsRatio')} />
      <Field label="Density" unit="kg/m³" keyboard="decimal-pad" {...field('density')} />
      <Field label="Where the numbers come from" multiline {...field('source')} />
      <Field label="How well that is known" {...field('status')} placeholder="measured by us, data sheet, a guess …" />
      {refused ? (
        <Text variant="note" color="apricot" role="alert">
          {refused}
        </Text>
      ) : null}
      <Button
        kind="primary"
        label={next ? `Publish version ${next.version + 1}` : 'Publish for this production'}
        working={form.isSubmitting && 'Publishing …'}
        disabledReason={mayPublish ? null : 'Leads publish presets.'}
        onPress={() => void form.submitForm()}
      />
      <Caution />
    </Sheet>
  );
}

function hardnessWords(hardness: number): string {
  const [low, high] = SHORE_A_RANGE;
  const about = `About ${stressText(modulusFromShoreA(hardness))}, ±${100 * HARDNESS_SPREAD} %, after Gent 1958.`;
  return hardness < low || hardness > high ? `${about} Outside Shore A ${low} to ${high} it is only a hint.` : about;
}

function presetOf(values: Values, given: Partial<PresetCreate>): PresetCreate {
  const fromHardness = values.from === 'hardness';
  const youngsModulus = fromHardness ? modulusFromShoreA(Number(values.shoreA)) : Number(values.kilopascals) * 1000;
  const spread: [number, number] = [youngsModulus * (1 - HARDNESS_SPREAD), youngsModulus * (1 + HARDNESS_SPREAD)];
  const range = given.youngsModulusRange ?? null;
  return {
    name: values.name.trim(),
    family: values.family.trim().toLowerCase(),
    law: given.law ?? 'stable-neo-hookean',
    youngsModulus,
    // A range belongs to the value it came with.
    youngsModulusRange: fromHardness
      ? spread
      : range && youngsModulus >= range[0] && youngsModulus <= range[1]
        ? range
        : null,
    poissonsRatio: Number(values.poissonsRatio),
    density: Number(values.density),
    source: fromHardness
      ? `${values.source.trim()} (Shore A ${values.shoreA}, modulus after Gent 1958)`
      : values.source.trim(),
    status: values.status.trim(),
  };
}

const styles = StyleSheet.create({
  stiffness: { gap: 8 },
});
