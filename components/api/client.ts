import type { z } from 'zod';
import { sessionSchema, type Session } from '../../shared/wire/session';
import { lostConnection, problemFrom, problemOf } from './problem';

/**
 * Calls to the API. The access token lives in memory only; when the server no longer takes it, it is renewed once
 * from the refresh cookie, however many calls are waiting.
 */
export class ApiClient {
  private token: string | null = null;
  private renewing: Promise<Session | null> | null = null;
  /** Told when the session cannot be renewed. */
  onSignedOut: () => void = () => undefined;

  async signIn(email: string, password: string): Promise<Session> {
    const response = await this.raw('/api/session', {
      method: 'POST',
      body: JSON.stringify({ email, password }),
      headers: JSON_TYPE,
    });
    if (!response.ok) throw await problemOf(response);
    return this.accept(sessionSchema.parse(await response.json()));
  }

  async signOut(): Promise<void> {
    await this.raw('/api/session', { method: 'DELETE', headers: { 'X-Lollop': '1', ...this.bearer() } });
    this.token = null;
  }

  /** A session from the refresh cookie, or null when there is none. */
  renew(): Promise<Session | null> {
    this.renewing ??= this.raw('/api/session/refresh', { method: 'POST', headers: { 'X-Lollop': '1' } })
      .then(async (response) => (response.ok ? this.accept(sessionSchema.parse(await response.json())) : null))
      .finally(() => (this.renewing = null));
    return this.renewing;
  }

  async get<T extends z.ZodType>(path: string, schema: T): Promise<z.infer<T>> {
    return schema.parse(await (await this.send(path, { method: 'GET' })).json());
  }

  async post<T extends z.ZodType>(path: string, body: unknown, schema: T): Promise<z.infer<T>> {
    return schema.parse(
      await (await this.send(path, { method: 'POST', body: JSON.stringify(body), headers: JSON_TYPE })).json(),
    );
  }

  async patch<T extends z.ZodType>(path: string, body: unknown, schema: T): Promise<z.infer<T>> {
    return schema.parse(
      await (await this.send(path, { method: 'PATCH', body: JSON.stringify(body), headers: JSON_TYPE })).json(),
    );
  }

  async remove(path: string): Promise<void> {
    await this.send(path, { method: 'DELETE' });
  }

  async getBytes(path: string): Promise<{ bytes: Uint8Array; headers: Headers }> {
    const response = await this.send(path, { method: 'GET' });
    return { bytes: new Uint8Array(await response.arrayBuffer()), headers: response.headers };
  }

  /** Sends bytes with their SHA-256, which the server checks. */
  async putBytes(path: string, bytes: Uint8Array): Promise<void> {
    // Fetched with the first bytes to send; the browser's own digest is missing where the page came by plain HTTP.
    const [{ sha256 }, { bytesToHex }] = await Promise.all([
      import('@noble/hashes/sha2'),
      import('@noble/hashes/utils'),
    ]);
    const headers = { 'Content-Type': 'application/octet-stream', 'X-Content-SHA256': bytesToHex(sha256(bytes)) };
    await this.send(path, { method: 'PUT', body: bytes as Uint8Array<ArrayBuffer>, headers });
  }

  /** Uploads one file with progress (0…1). A lost connection is told as a sentence; nothing is half-saved. */
  async upload<T extends z.ZodType>(
    path: string,
    file: File,
    schema: T,
    onProgress: (share: number) => void,
    signal?: AbortSignal,
  ): Promise<z.infer<T>> {
    const once = () =>
      new Promise<{ status: number; body: unknown }>((resolve, reject) => {
        const request = new XMLHttpRequest();
        const form = new FormData();
        form.append('file', file);
        request.open('POST', path);
        for (const [name, value] of Object.entries(this.bearer())) request.setRequestHeader(name, value);
        request.upload.onprogress = (event) => event.lengthComputable && onProgress(event.loaded / event.total);
        request.onload = () => {
          let body: unknown = null;
          try {
            body = JSON.parse(request.responseText);
          } catch {
            // An answer that is no JSON becomes the plain problem below.
          }
          resolve({ status: request.status, body });
        };
        request.onerror = () =>
          reject(lostConnection(`“${file.name}” was not kept. Choose it again when the connection returns.`));
        request.onabort = () => reject(new DOMException('Stopped', 'AbortError'));
        signal?.addEventListener('abort', () => request.abort());
        request.send(form);
      });
    let answer = await once();
    if (answer.status === 401 && (await this.renew())) answer = await once();
    if (answer.status < 200 || answer.status > 299) throw problemFrom(answer.status, answer.body);
    return schema.parse(answer.body);
  }

  private accept(session: Session): Session {
    this.token = session.accessToken;
    return session;
  }

  private bearer(): Record<string, string> {
    return this.token ? { Authorization: `Bearer ${this.token}` } : {};
  }

  private async raw(path: string, init: RequestInit): Promise<Response> {
    try {
      return await fetch(path, { credentials: 'same-origin', ...init });
    } catch {
      throw lostConnection();
    }
  }

  private async send(path: string, init: RequestInit): Promise<Response> {
    const withToken = () => ({ ...init, headers: { ...(init.headers as Record<string, string>), ...this.bearer() } });
    let response = await this.raw(path, withToken());
    if (response.status === 401) {
      if (await this.renew()) response = await this.raw(path, withToken());
      else this.onSignedOut();
    }
    if (!response.ok) throw await problemOf(response);
    return response;
  }
}

const JSON_TYPE = { 'Content-Type': 'application/json' };

export const api = new ApiClient();
