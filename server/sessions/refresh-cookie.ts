import type { CookieOptions, Request, Response } from 'express';

/** The `__Host-` prefix makes browsers insist on Secure, Path=/ and no Domain; plain http cannot have it. */
const nameFor = (req: Request) => (req.secure ? '__Host-lollop-refresh' : 'lollop-refresh');

const optionsFor = (req: Request): CookieOptions => ({
  httpOnly: true,
  sameSite: 'strict',
  secure: req.secure,
  path: '/',
});

export function readRefreshCookie(req: Request): string | undefined {
  const value: unknown = req.cookies?.[nameFor(req)];
  return typeof value === 'string' && value.length > 0 && value.length <= 100 ? value : undefined;
}

export function setRefreshCookie(req: Request, res: Response, token: string, expires: Date): void {
  res.cookie(nameFor(req), token, { ...optionsFor(req), expires });
}

export function clearRefreshCookie(req: Request, res: Response): void {
  res.clearCookie(nameFor(req), optionsFor(req));
}
