import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { Config } from '../config';
import { normalEmail } from '../people/people.service';
import { TooManyAttempts } from '../problems/domain-errors';

interface Limit {
  minutes: number;
  most: number;
  /** '' when the request does not count */
  key: (req: Request) => string;
  onlyFailures: boolean;
  detail: string;
}

const MINUTE = 60_000;
const LONGEST_EMAIL = 254;

function limit({ minutes, most, key, onlyFailures, detail }: Limit): RequestHandler {
  return rateLimit({
    windowMs: minutes * MINUTE,
    limit: most,
    keyGenerator: key,
    skip: (req) => key(req) === '',
    skipSuccessfulRequests: onlyFailures,
    standardHeaders: false,
    legacyHeaders: false,
    handler: (req, _res, next) => {
      const resetTime = (req as Request & { rateLimit?: { resetTime?: Date } }).rateLimit?.resetTime;
      const wait = resetTime ? resetTime.getTime() - Date.now() : minutes * MINUTE;
      next(new TooManyAttempts(detail, Math.max(1, Math.ceil(wait / 1000))));
    },
  });
}

const byAddress = (req: Request) => ipKeyGenerator(req.ip ?? '');

export function everyRequest(config: Config): RequestHandler {
  return limit({
    minutes: 1,
    most: config.LOLLOP_REQUESTS_PER_MINUTE,
    key: byAddress,
    onlyFailures: false,
    detail: 'Too many requests from this address. Wait a moment.',
  });
}

/** The account a sign-in is for; '' when the body names none, which the controller refuses anyway. */
function byAccount(req: Request): string {
  const email: unknown = req.body?.email;
  return typeof email === 'string' && email.length <= LONGEST_EMAIL ? normalEmail(email) : '';
}

export interface SignInLimits {
  address: RequestHandler;
  /** Reads the body, so it stands behind the one that parses it. */
  account: RequestHandler;
}

/** Two limits, so that neither one address trying many accounts nor many addresses trying one get far. */
export function signInLimits(config: Config): SignInLimits {
  const minutes = config.LOLLOP_SIGN_IN_WINDOW_MINUTES;
  const detail = 'Too many sign-ins failed. Wait a while, then try again.';
  return {
    address: limit({ minutes, most: config.LOLLOP_SIGN_INS_PER_ADDRESS, key: byAddress, onlyFailures: true, detail }),
    account: limit({ minutes, most: config.LOLLOP_SIGN_INS_PER_ACCOUNT, key: byAccount, onlyFailures: true, detail }),
  };
}
