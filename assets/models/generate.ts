import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { writeBezierPatchText } from '../../solver/exchange/bezier-patch-text';
import { writeStep } from '../../solver/exchange/step-writer';
import { gaugeBeam } from './build/beam';
import { bellBuoy } from './build/buoy';
import { quayFender } from './build/fender';
import { paradeGull } from './build/gull';
import { steamedPudding } from './build/pudding';

/** Fixed, so that the files are the same whenever they are made. */
const STAMP = '2026-12-01T09:00:00';
const MILLIMETRE = 0.001;

/** Writes the demo models beside this file: `node -r @swc-node/register assets/models/generate.ts`. */
const write = (file: string, text: string) => writeFileSync(join(__dirname, file), text);

write('steamed-pudding.step', writeStep(steamedPudding(), 'steamed pudding', MILLIMETRE, STAMP));
write('quay-fender.step', writeStep(quayFender(), 'quay fender', MILLIMETRE, STAMP));
write('parade-gull.step', writeStep(paradeGull(), 'parade gull', MILLIMETRE, STAMP));
write('bell-buoy.bpt', writeBezierPatchText(bellBuoy()));
write('gauge-beam.step', writeStep(gaugeBeam(), 'gauge beam', MILLIMETRE, STAMP));
