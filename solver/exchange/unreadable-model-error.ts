/** A file that cannot be read; the message is a sentence for the person who brought it. */
export class UnreadableModelError extends Error {
  override readonly name = 'UnreadableModelError';
}
