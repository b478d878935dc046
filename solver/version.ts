/** Changes whenever the same scene may give other numbers; kept with every run. */
export const SOLVER_VERSION = '1.4.1';
