import { flipPatch, scalePatch } from '../geometry/transform';
import type { Patch } from '../geometry/patch';
import { MAX_PATCHES, patchFault, type ImportResult } from './import-result';
import { occurrencesOf, type Occurrence } from './step-assembly';
import { isTrimmed } from './step-faces';
import { IDENTITY, isIdentity, placePatch } from './step-placement';
import { isSpline, OTHER_SURFACES, readSplineSurface, SPLINE_TYPES } from './step-surface';
import { tokenizeStep, type StepFile } from './step-tokenizer';
import { fileUnit } from './step-units';
import { UnreadableModelError } from './unreadable-model-error';

const SPLINE = 'B-spline surface';

/**
 * B-spline surfaces of a STEP file (ISO 10303-42), loose or in faces, where the assembly places them and without their
 * trims. Everything that is not imported is counted with a reason, so declared = imported + skipped; a surface that an
 * assembly shows several times counts each time.
 */
export function readStep(text: string): ImportResult {
  const file = tokenizeStep(text);
  if (file.instances.size === 0) {
    throw new UnreadableModelError('This STEP file holds no readable data. Ask for it again.');
  }
  const skipped = new SkippedSurfaces();
  countOtherSurfaces(file, skipped);
  const unit = fileUnit(file);
  const { occurrences, remarks } = occurrencesOf(file, unit?.metres ?? null);
  const { patches, trimmed, otherUnits } = readPatches(
    file,
    withLoose(file, occurrences),
    unit?.metres ?? null,
    skipped,
  );
  const declared = patches.length + skipped.total;
  if (patches.length === 0) throw nothingUsable(file, declared, skipped);
  if (!file.complete)
    remarks.push(`The file stops before its end. ${plural(patches.length, 'patch', 'patches')} could be read.`);
  if (file.damaged.length > 0)
    remarks.push(`${plural(file.damaged.length, 'damaged line was', 'damaged lines were')} passed over.`);
  if (trimmed > 0) remarks.push(`${plural(trimmed, 'face is', 'faces are')} trimmed in the file and shown whole here.`);
  if (otherUnits > 0) {
    remarks.push(
      `${plural(otherUnits, 'patch is', 'patches are')} in another unit in the file and converted to ${unit!.name} here.`,
    );
  }
  return {
    format: 'step',
    patches,
    report: { declared, imported: patches.length, skipped: skipped.list(), remarks, declaredUnit: unit },
  };
}

const plural = (count: number, one: string, many: string) => `${count} ${count === 1 ? one : many}`;

class SkippedSurfaces {
  total = 0;
  private readonly entries = new Map<string, { entity: string; count: number; reason: string }>();

  add(entity: string, reason: string): void {
    const key = `${entity}|${reason}`;
    const entry = this.entries.get(key) ?? { entity, count: 0, reason };
    entry.count++;
    this.total++;
    this.entries.set(key, entry);
  }

  list() {
    return [...this.entries.values()];
  }
}

/** Surfaces of other kinds, and surfaces of any kind in lines that could not be read. */
function countOtherSurfaces(file: StepFile, skipped: SkippedSurfaces): void {
  for (const instance of file.instances.values()) {
    const other = instance.records.find((record) => OTHER_SURFACES[record.type]);
    if (other) skipped.add(OTHER_SURFACES[other.type]!, 'only B-spline surfaces are read');
  }
  for (const types of file.damaged) {
    for (const type of types) {
      if (SPLINE_TYPES.includes(type)) skipped.add(SPLINE, 'its line in the file is damaged');
      else if (OTHER_SURFACES[type]) skipped.add(OTHER_SURFACES[type]!, 'its line in the file is damaged');
    }
  }
}

/** Adds the surfaces that no representation shows, in the order of the file. */
function withLoose(file: StepFile, occurrences: Occurrence[]): Occurrence[] {
  const shown = new Set(occurrences.map((o) => o.surface));
  const all = [...occurrences];
  for (const instance of file.instances.values()) {
    if (!isSpline(instance) || shown.has(instance.id)) continue;
    all.push({
      surface: instance.id,
      face: null,
      reversed: false,
      name: '',
      group: '',
      placement: IDENTITY,
      metres: null,
    });
  }
  const order = new Map([...file.instances.keys()].map((id, k) => [id, k]));
  return all.sort((a, b) => order.get(a.surface)! - order.get(b.surface)!);
}

function readPatches(
  file: StepFile,
  occurrences: readonly Occurrence[],
  metres: number | null,
  skipped: SkippedSurfaces,
) {
  const read = new Map<number, Patch | string>();
  const patches: Patch[] = [];
  let trimmed = 0;
  let otherUnits = 0;
  for (const occurrence of occurrences) {
    if (patches.length >= MAX_PATCHES) {
      skipped.add(SPLINE, `more than ${MAX_PATCHES} patches`);
      continue;
    }
    const { surface, face } = occurrence;
    const known = read.get(surface) ?? readChecked(file, surface);
    read.set(surface, known);
    if (typeof known === 'string') {
      skipped.add(SPLINE, known);
      continue;
    }
    if (face !== null && isTrimmed(file, file.instances.get(face)!, known)) trimmed++;
    let patch: Patch = {
      ...known,
      name: occurrence.name || known.name || `patch ${patches.length + 1}`,
      group: occurrence.group,
    };
    if (occurrence.metres !== null && metres !== null && occurrence.metres !== metres) {
      patch = scalePatch(patch, occurrence.metres / metres);
      otherUnits++;
    }
    if (!isIdentity(occurrence.placement)) patch = placePatch(patch, occurrence.placement);
    patches.push(occurrence.reversed ? flipPatch(patch) : patch);
  }
  return { patches, trimmed, otherUnits };
}

/** The surface of one instance, or why it cannot be used. */
function readChecked(file: StepFile, id: number): Patch | string {
  const surface = readSplineSurface(file, file.instances.get(id)!);
  return typeof surface === 'string' ? surface : (patchFault(surface) ?? surface);
}

function nothingUsable(file: StepFile, declared: number, skipped: SkippedSurfaces): UnreadableModelError {
  if (declared === 0) {
    return new UnreadableModelError(
      'No surfaces were found in this STEP file. Export the model’s surfaces as B-splines and bring it again.',
    );
  }
  if (!file.complete) {
    return new UnreadableModelError(
      `This STEP file stops before its end, and none of its ${plural(declared, 'surface', 'surfaces')} is whole. Ask for it again.`,
    );
  }
  const what = skipped
    .list()
    .slice(0, 4)
    .map((s) => `${s.count} × ${s.entity}: ${s.reason}`)
    .join('; ');
  const which =
    declared === 1
      ? 'The one surface in this STEP file cannot'
      : `None of the ${declared} surfaces in this STEP file can`;
  return new UnreadableModelError(`${which} be used (${what}). Export the model as B-splines and bring it again.`);
}
