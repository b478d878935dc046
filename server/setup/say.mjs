/** What the set-up says to the person at the terminal, and how it gives up: one clear sentence. */
export const say = (text) => process.stdout.write(`${text}\n`);

export class SetupFault extends Error {}

/** Runs the set-up; a fault is told as its sentence, anything else keeps its trace. */
export async function runSetup(main) {
  try {
    await main();
  } catch (error) {
    process.stderr.write(error instanceof SetupFault ? `\n${error.message}\n` : `${error.stack ?? error}\n`);
    process.exit(1);
  }
}
