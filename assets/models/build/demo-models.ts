import { writeBezierPatchText } from '../../../solver/exchange/bezier-patch-text';
import { writeStep } from '../../../solver/exchange/step-writer';
import { gaugeBeam } from './beam';
import { bellBuoy } from './buoy';
import { quayFender } from './fender';
import { paradeGull } from './gull';
import { steamedPudding } from './pudding';

/** Fixed, so that the files are the same whenever they are made. */
const STAMP = '2026-12-01T09:00:00';
const MILLIMETRE = 0.001;

/** The demo models as files. */
export function demoModels(): { file: string; text: string }[] {
  return [
    { file: 'steamed-pudding.step', text: writeStep(steamedPudding(), 'steamed pudding', MILLIMETRE, STAMP) },
    { file: 'quay-fender.step', text: writeStep(quayFender(), 'quay fender', MILLIMETRE, STAMP) },
    { file: 'parade-gull.step', text: writeStep(paradeGull(), 'parade gull', MILLIMETRE, STAMP) },
    { file: 'bell-buoy.bpt', text: writeBezierPatchText(bellBuoy()) },
    { file: 'gauge-beam.step', text: writeStep(gaugeBeam(), 'gauge beam', MILLIMETRE, STAMP) },
  ];
}
