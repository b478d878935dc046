/** The stage and the parts of the solver that screens use, fetched once, when a screen first shows a body. */
export const stageModule = () => import('./stage-canvas');
