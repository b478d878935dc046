import type { StepFile, StepInstance } from './step-tokenizer';
import { listOf, nameOf, recordOf, refOf } from './step-values';

export interface LengthUnit {
  name: string;
  metres: number;
}

const PREFIX: Record<string, number> = {
  EXA: 1e18, PETA: 1e15, TERA: 1e12, GIGA: 1e9, MEGA: 1e6, KILO: 1e3, HECTO: 1e2, DECA: 1e1,
  DECI: 1e-1, CENTI: 1e-2, MILLI: 1e-3, MICRO: 1e-6, NANO: 1e-9, PICO: 1e-12,
}; // prettier-ignore

const NAMES: Record<string, string> = {
  '0.000001': 'µm',
  '0.001': 'mm',
  '0.01': 'cm',
  '1': 'm',
  '0.0254': 'inch',
  '0.3048': 'foot',
  '0.9144': 'yard',
  '1000': 'km',
};

/**
 * The length unit of a representation context (ISO 10303-41 SI_UNIT and CONVERSION_BASED_UNIT), in metres; null when it
 * names none that can be read.
 */
export function contextUnit(file: StepFile, context: StepInstance | undefined): LengthUnit | null {
  const units = listOf(recordOf(context, 'GLOBAL_UNIT_ASSIGNED_CONTEXT')?.args.at(-1));
  return firstLength(file, units.map(refOf));
}

/** The unit of the first context that has one, or else of any unit in the file. */
export function fileUnit(file: StepFile): LengthUnit | null {
  for (const instance of file.instances.values()) {
    const unit = contextUnit(file, instance);
    if (unit) return unit;
  }
  return firstLength(file, file.instances.keys());
}

function firstLength(file: StepFile, ids: Iterable<number | null>): LengthUnit | null {
  for (const id of ids) {
    const metres = id === null ? null : lengthIn(file, id, 0);
    if (id === null || metres === null) continue;
    const conversion = recordOf(file.instances.get(id), 'CONVERSION_BASED_UNIT');
    const own = nameOf(conversion?.args[0]).toLowerCase();
    return { name: NAMES[String(Number(metres.toPrecision(9)))] ?? (own || `${metres} m`), metres };
  }
  return null;
}

function lengthIn(file: StepFile, id: number, depth: number): number | null {
  const instance = file.instances.get(id);
  if (!instance || depth > 4 || !recordOf(instance, 'LENGTH_UNIT')) return null;
  const si = recordOf(instance, 'SI_UNIT');
  if (si) {
    const words = si.args.filter((a): a is { enum: string } => typeof a === 'object' && a !== null && 'enum' in a);
    if (words[words.length - 1]?.enum !== 'METRE') return null;
    return words.length > 1 ? (PREFIX[words[0]!.enum] ?? null) : 1;
  }
  const conversion = recordOf(instance, 'CONVERSION_BASED_UNIT');
  const measure = file.instances.get(refOf(conversion?.args[1]) ?? -1);
  const record = recordOf(measure, 'LENGTH_MEASURE_WITH_UNIT') ?? recordOf(measure, 'MEASURE_WITH_UNIT');
  if (!record) return null;
  const raw = record.args[0];
  const value = typeof raw === 'number' ? raw : raw && typeof raw === 'object' && 'args' in raw ? raw.args[0] : null;
  const base = lengthIn(file, refOf(record.args[1]) ?? -1, depth + 1);
  return typeof value === 'number' && value > 0 && base !== null ? value * base : null;
}
