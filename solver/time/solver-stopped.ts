/** The solver could not go on; the message is a sentence for a person and the last good pose is kept. */
export class SolverStopped extends Error {
  override readonly name = 'SolverStopped';
}
