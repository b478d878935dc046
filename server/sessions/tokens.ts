import { createHash, createHmac, randomBytes } from 'node:crypto';
import jwt from 'jsonwebtoken';
import { z } from 'zod';
import { NotSignedIn } from '../problems/domain-errors';

const ISSUER = 'lollop';
const claimsSchema = z.object({ sub: z.uuid(), sid: z.uuid() });

export interface AccessClaims {
  personId: string;
  sessionId: string;
}

/** Makes and reads the two kinds of token. */
export class Tokens {
  constructor(
    private readonly secret: string,
    private readonly accessMinutes: number,
  ) {}

  access({ personId, sessionId }: AccessClaims): { accessToken: string; expiresAt: Date } {
    const issued = Math.floor(Date.now() / 1000);
    const expires = issued + this.accessMinutes * 60;
    const accessToken = jwt.sign(
      { sub: personId, sid: sessionId, iat: issued, exp: expires, iss: ISSUER },
      this.secret,
      {
        algorithm: 'HS256',
      },
    );
    return { accessToken, expiresAt: new Date(expires * 1000) };
  }

  /** @throws NotSignedIn when the token is not ours, was changed or has expired */
  readAccess(token: string): AccessClaims {
    try {
      const { sub, sid } = claimsSchema.parse(
        jwt.verify(token, this.secret, { algorithms: ['HS256'], issuer: ISSUER }),
      );
      return { personId: sub, sessionId: sid };
    } catch {
      throw new NotSignedIn();
    }
  }

  /** 256 bits from the system's generator. */
  firstRefresh(): string {
    return randomBytes(32).toString('base64url');
  }

  /**
   * The successor follows from its predecessor and our secret, so two tabs that send the same token at
   * once get the same successor, and the token need not be stored for that.
   */
  successor(token: string): string {
    return createHmac('sha256', this.secret).update(`refresh:${token}`).digest('base64url');
  }

  hash(token: string): string {
    return createHash('sha256').update(token).digest('hex');
  }
}
