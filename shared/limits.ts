/** Limits that both sides check. Sizes in bytes, lengths in characters. */
export const MAX_UPLOAD_BYTES = 64 * 1024 * 1024;
export const MAX_CHUNK_BYTES = 8 * 1024 * 1024;
/** How the surface follows the coefficients, and the solver's state to go on from. */
export const MAX_RECIPE_BYTES = 32 * 1024 * 1024;
export const MAX_CHECKPOINT_BYTES = 16 * 1024 * 1024;
/** An unfinished run that nothing arrived for this long shows as stopped; it can still be gone on with. */
export const RUN_QUIET_MINUTES = 5;
export const FRAMES_PER_CHUNK = 24;
export const MAX_PARTS = 200;
export const MAX_FRAMES = 4800;
export const MAX_SUBSTEPS = 64;
export const MAX_NAME = 120;
export const MAX_REMARK = 500;
export const PAGE_SIZE = 50;
