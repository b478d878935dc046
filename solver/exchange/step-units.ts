import type { StepFile, StepInstance, StepValue } from './step-tokenizer';

const PREFIX: Record<string, number> = {
  EXA: 1e18, PETA: 1e15, TERA: 1e12, GIGA: 1e9, MEGA: 1e6, KILO: 1e3, HECTO: 1e2, DECA: 1e1,
  DECI: 1e-1, CENTI: 1e-2, MILLI: 1e-3, MICRO: 1e-6, NANO: 1e-9, PICO: 1e-12,
}; // prettier-ignore

const NAMES: Record<string, string> = { '0.001': 'mm', '0.01': 'cm', '1': 'm', '0.0254': 'inch', '0.3048': 'foot', '1000': 'km' };

export const refOf = (value: StepValue | undefined): number | null =>
  value !== null && typeof value === 'object' && !Array.isArray(value) && 'ref' in value ? value.ref : null;

export const listOf = (value: StepValue | undefined): StepValue[] => (Array.isArray(value) ? value : []);

export const recordOf = (instance: StepInstance | undefined, type: string) =>
  instance?.records.find((record) => record.type === type);

/**
 * The length unit of the file's geometric context (ISO 10303-41 SI_UNIT and CONVERSION_BASED_UNIT), in metres;
 * null when the file names none.
 */
export function stepLengthUnit(file: StepFile): { name: string; metres: number } | null {
  const candidates: number[] = [];
  for (const instance of file.instances.values()) {
    const context = recordOf(instance, 'GLOBAL_UNIT_ASSIGNED_CONTEXT');
    if (context) for (const item of listOf(context.args[context.args.length - 1])) candidates.push(refOf(item) ?? -1);
  }
  for (const instance of file.instances.values()) candidates.push(instance.id);
  for (const id of candidates) {
    const metres = lengthIn(file, id, 0);
    if (metres !== null) {
      const instance = file.instances.get(id);
      const conversion = recordOf(instance, 'CONVERSION_BASED_UNIT');
      const own = typeof conversion?.args[0] === 'string' ? conversion.args[0].toLowerCase() : null;
      return { name: NAMES[String(Number(metres.toPrecision(9)))] ?? own ?? `${metres} m`, metres };
    }
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
