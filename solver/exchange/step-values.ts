import type { StepInstance, StepValue } from './step-tokenizer';

export const refOf = (value: StepValue | undefined): number | null =>
  value !== null && typeof value === 'object' && !Array.isArray(value) && 'ref' in value ? value.ref : null;

export const listOf = (value: StepValue | undefined): StepValue[] => (Array.isArray(value) ? value : []);

export const recordOf = (instance: StepInstance | undefined, type: string) =>
  instance?.records.find((record) => record.type === type);

/** A name as a person gave it; '' where the writer put none. */
export const nameOf = (value: StepValue | undefined): string =>
  typeof value === 'string' && value !== 'NONE' ? value.trim() : '';

export const isFalse = (value: StepValue | undefined): boolean =>
  value !== null && typeof value === 'object' && !Array.isArray(value) && 'enum' in value && value.enum === 'F';

/** The three coordinates of a CARTESIAN_POINT or DIRECTION; missing ones are 0, unreadable ones NaN; null when there is none. */
export function tripleOf(
  instance: StepInstance | undefined,
  type: 'CARTESIAN_POINT' | 'DIRECTION',
): [number, number, number] | null {
  const values = listOf(recordOf(instance, type)?.args[1]);
  if (values.length === 0) return null;
  const at = (d: number) => (d >= values.length ? 0 : typeof values[d] === 'number' ? (values[d] as number) : NaN);
  return [at(0), at(1), at(2)];
}
