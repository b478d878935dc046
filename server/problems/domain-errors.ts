/**
 * What services throw when a request cannot be done. One class a cause; `detail` is a sentence for
 * the person, written here and in the services, never taken from an exception. HTTP lives in the
 * problem mapper only.
 */
export abstract class DomainError extends Error {
  constructor(readonly detail: string) {
    super(detail);
    this.name = new.target.name;
  }
}

export interface Fault {
  /** JSON pointer (RFC 6901) into the request body, or `/query/limit`-like for the query. */
  pointer: string;
  detail: string;
}

export class InvalidRequest extends DomainError {
  constructor(
    detail: string,
    readonly faults: Fault[] = [],
  ) {
    super(detail);
  }
}

export class NotSignedIn extends DomainError {
  constructor() {
    super('Sign in first.');
  }
}

export class WrongCredentials extends DomainError {
  constructor() {
    super('E-mail address and password do not fit together. Try again, or ask the administrator.');
  }
}

export class SessionEnded extends DomainError {
  constructor() {
    super('This sign-in has ended. Sign in again; what is saved is kept.');
  }
}

export class NotAllowed extends DomainError {}

/** Also the answer for things in productions the person is not in, so that nobody learns they exist. */
export class NotFound extends DomainError {
  constructor(what: string) {
    super(`There is no such ${what}, or you are not in its production.`);
  }
}

export class Conflict extends DomainError {}

export class TooLarge extends DomainError {}

export class TooManyAttempts extends DomainError {
  constructor(
    detail: string,
    readonly retryAfterSeconds: number,
  ) {
    super(detail);
  }
}

export class UnreadableModel extends DomainError {}

export class ChecksumMismatch extends DomainError {
  constructor() {
    super('The bytes that arrived are not the bytes that were sent. Nothing was kept; send them again.');
  }
}
