import { type DataSource, type EntityManager, LessThan } from 'typeorm';
import type { AuditService } from '../audit/audit.service';
import type { Actor } from '../people/actor';
import type { PeopleService } from '../people/people.service';
import type { Person } from '../people/person.entity';
import { NotSignedIn, SessionEnded, WrongCredentials } from '../problems/domain-errors';
import { RefreshToken } from './refresh-token.entity';
import { RefreshSession } from './session.entity';
import type { Tokens } from './tokens';

/** Two tabs may send one token at the same moment; later than this, a used token is a stolen one. */
export const GRACE_MILLISECONDS = 10_000;
const DAY = 86_400_000;

export interface Issued {
  person: Person;
  accessToken: string;
  expiresAt: Date;
  refreshToken: string;
  /** When the sign-in ends for good. */
  sessionExpiresAt: Date;
}

/** What became of a refresh, decided inside the transaction that must be kept whatever comes out. */
type Exchange = { kind: 'ended' } | { kind: 'issued'; session: RefreshSession; refreshToken: string };

export class SessionsService {
  constructor(
    private readonly data: DataSource,
    private readonly people: PeopleService,
    private readonly audit: AuditService,
    private readonly tokens: Tokens,
    private readonly sessionDays: number,
  ) {}

  /** @throws WrongCredentials, in the same time and words whichever half was wrong */
  async signIn(email: string, password: string, address: string | undefined): Promise<Issued> {
    const person = await this.people.byCredentials(email, password);
    if (!person) {
      const known = await this.people.byEmail(email);
      await this.audit.record(this.data.manager, { kind: 'sign-in-failed', personId: known?.id ?? null, address });
      throw new WrongCredentials();
    }
    const refreshToken = this.tokens.firstRefresh();
    const expiresAt = new Date(Date.now() + this.sessionDays * DAY);
    const session = await this.data.transaction(async (manager) => {
      await manager.delete(RefreshSession, { personId: person.id, expiresAt: LessThan(new Date()) });
      const begun = await manager.save(
        manager.create(RefreshSession, { personId: person.id, expiresAt, revokedAt: null }),
      );
      await manager.insert(RefreshToken, { hash: this.tokens.hash(refreshToken), sessionId: begun.id, usedAt: null });
      await this.audit.record(manager, { kind: 'signed-in', personId: person.id, address });
      return begun;
    });
    return this.issue(person, session, refreshToken);
  }

  /**
   * Exchanges a refresh token for its successor. A token that was used before ends the whole session,
   * unless that was within the grace and the successor still waits to be used.
   * @throws SessionEnded
   */
  async refresh(token: string, address: string | undefined): Promise<Issued> {
    const exchange = await this.data.transaction((manager) => this.exchange(manager, token, address));
    if (exchange.kind === 'ended') throw new SessionEnded();
    const person = await this.people.byId(exchange.session.personId);
    if (!person) throw new SessionEnded();
    return this.issue(person, exchange.session, exchange.refreshToken);
  }

  /** Ends the session the token belongs to; an unknown or missing token has nothing to end. */
  async signOut(token: string | undefined, address: string | undefined): Promise<void> {
    if (token === undefined) return;
    await this.data.transaction(async (manager) => {
      const stored = await manager.findOneBy(RefreshToken, { hash: this.tokens.hash(token) });
      const session = stored && (await this.lockLive(manager, stored.sessionId));
      if (!session) return;
      await manager.update(RefreshSession, { id: session.id }, { revokedAt: new Date() });
      await this.audit.record(manager, { kind: 'signed-out', personId: session.personId, address });
    });
  }

  /** @throws NotSignedIn for a token that is not valid; SessionEnded when its session was ended */
  async actorOfToken(accessToken: string): Promise<Actor> {
    const { personId, sessionId } = this.tokens.readAccess(accessToken);
    const session = await this.data
      .getRepository(RefreshSession)
      .findOne({ where: { id: sessionId, personId }, relations: { person: true } });
    if (!session) throw new NotSignedIn();
    if (session.revokedAt !== null || session.expiresAt.getTime() <= Date.now()) throw new SessionEnded();
    const { id, name, administrator } = session.person;
    return { id, name, administrator };
  }

  private async exchange(manager: EntityManager, token: string, address: string | undefined): Promise<Exchange> {
    const hash = this.tokens.hash(token);
    const found = await manager.findOneBy(RefreshToken, { hash });
    const session = found && (await this.lockLive(manager, found.sessionId));
    if (!session) return { kind: 'ended' };

    // Read again: another tab may have used it while this one waited for the lock.
    const stored = await manager.findOneByOrFail(RefreshToken, { hash });
    const refreshToken = this.tokens.successor(token);
    const successorHash = this.tokens.hash(refreshToken);
    if (stored.usedAt === null) {
      await manager.update(RefreshToken, { hash }, { usedAt: new Date() });
      await manager.insert(RefreshToken, { hash: successorHash, sessionId: session.id, usedAt: null });
      return { kind: 'issued', session, refreshToken };
    }
    const successor = await manager.findOneBy(RefreshToken, { hash: successorHash });
    const inGrace = Date.now() - stored.usedAt.getTime() <= GRACE_MILLISECONDS;
    if (inGrace && successor?.usedAt === null) return { kind: 'issued', session, refreshToken };

    await manager.update(RefreshSession, { id: session.id }, { revokedAt: new Date() });
    await this.audit.record(manager, { kind: 'session-revoked', personId: session.personId, address });
    return { kind: 'ended' };
  }

  private async lockLive(manager: EntityManager, id: string): Promise<RefreshSession | null> {
    const session = await manager.findOne(RefreshSession, { where: { id }, lock: { mode: 'pessimistic_write' } });
    const live = session && session.revokedAt === null && session.expiresAt.getTime() > Date.now();
    return live ? session : null;
  }

  private issue(person: Person, session: RefreshSession, refreshToken: string): Issued {
    const { accessToken, expiresAt } = this.tokens.access({ personId: person.id, sessionId: session.id });
    return { person, accessToken, expiresAt, refreshToken, sessionExpiresAt: session.expiresAt };
  }
}
