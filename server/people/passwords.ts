import { compare, hash } from 'bcryptjs';

/** bcrypt reads no more than this many bytes; a longer password would be cut without a word. */
export const MOST_PASSWORD_BYTES = 72;

export class Passwords {
  private readonly nobody: Promise<string>;

  constructor(private readonly cost: number) {
    this.nobody = hash('nobody has this password', cost);
  }

  hash(password: string): Promise<string> {
    if (Buffer.byteLength(password) > MOST_PASSWORD_BYTES) throw new RangeError('A password has at most 72 bytes.');
    return hash(password, this.cost);
  }

  /** Takes as long for a person who does not exist (`hash` undefined) as for one who does. */
  async fits(password: string, storedHash: string | undefined): Promise<boolean> {
    const fits = await compare(password, storedHash ?? (await this.nobody));
    return fits && storedHash !== undefined;
  }
}
