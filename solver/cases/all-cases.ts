import { cantileverCase } from './cantilever/case';
import { cookMembrane } from './cook-membrane/case';
import { elastica } from './elastica/case';
import { endMoment } from './end-moment/case';
import { frequencies } from './frequencies/case';
import { hangingBar } from './hanging-bar/case';
import type { PublishedCase } from './published-case';
import { rollUp } from './roll-up/case';
import { rotatingBar } from './rotating-bar/case';
import { saggingBar } from './sagging-bar/case';
import { shearCoefficient } from './shear-coefficient/case';
import { thickWalled } from './thick-walled/case';
import { torsion } from './torsion/case';

/** Cases that give their numbers as rows: for the tests and for the table of the README. */
export const PUBLISHED_CASES: readonly PublishedCase[] = [
  cantileverCase,
  endMoment,
  shearCoefficient,
  elastica,
  rollUp,
  frequencies,
  torsion,
  thickWalled,
  hangingBar,
  rotatingBar,
  cookMembrane,
  saggingBar,
];
