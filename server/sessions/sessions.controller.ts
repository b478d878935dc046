import type { Request, RequestHandler, Response } from 'express';
import { signInRequestSchema } from '../../shared/wire/session';
import { parseBody } from '../middleware/parse';
import { NotSignedIn } from '../problems/domain-errors';
import type { MembershipsService } from '../productions/memberships.service';
import { clearRefreshCookie, readRefreshCookie, setRefreshCookie } from './refresh-cookie';
import { sessionWire } from './sessions.mapper';
import type { Issued, SessionsService } from './sessions.service';

export class SessionsController {
  constructor(
    private readonly sessions: SessionsService,
    private readonly memberships: MembershipsService,
  ) {}

  signIn: RequestHandler = async (req, res) => {
    const { email, password } = parseBody(signInRequestSchema, req);
    await this.answer(req, res, await this.sessions.signIn(email, password, req.ip));
  };

  refresh: RequestHandler = async (req, res) => {
    const token = readRefreshCookie(req);
    if (token === undefined) throw new NotSignedIn();
    await this.answer(req, res, await this.sessions.refresh(token, req.ip));
  };

  signOut: RequestHandler = async (req, res) => {
    await this.sessions.signOut(readRefreshCookie(req), req.ip);
    clearRefreshCookie(req, res);
    res.status(204).end();
  };

  private async answer(req: Request, res: Response, issued: Issued): Promise<void> {
    setRefreshCookie(req, res, issued.refreshToken, issued.sessionExpiresAt);
    res.json(sessionWire(issued, await this.memberships.ofPerson(issued.person.id)));
  }
}
