/**
 * Who may speak to the rig. It listens on the loopback address only; beyond that a foreign Host is refused (a name that was
 * rebound to 127.0.0.1), pages and the disk need the cookie that the start address hands out, and writes need our own Origin
 * and a header that no form can send.
 */
import { randomBytes, timingSafeEqual } from 'node:crypto';
import type { IncomingMessage } from 'node:http';

export const LABEL = 'rig.localhost';
export const WRITE_HEADER = 'x-oilway-rig';
const COOKIE = 'oilway-rig';

export const newToken = (): string => randomBytes(24).toString('hex');

export type Origin = 'workbench' | 'webview' | 'loopback' | 'foreign';

/** What the Host header names: the workbench, one of its webviews, the bare loopback address (health check), or none of ours. */
export function hostOf(request: IncomingMessage, port: number): Origin {
  const host = request.headers.host ?? '';
  if (host === `${LABEL}:${port}`) return 'workbench';
  if (new RegExp(`^[a-z0-9-]+\\.${LABEL.replaceAll('.', '\\.')}:${port}$`).test(host)) return 'webview';
  if (host === `127.0.0.1:${port}`) return 'loopback';
  return 'foreign';
}

/** The Origin of one of our webviews, as the header says it: it may load scripts of the build, and nobody else's page may. */
export function webviewOrigin(request: IncomingMessage, port: number): string | undefined {
  const origin = request.headers.origin ?? '';
  return new RegExp(`^http://[a-z0-9-]+\\.${LABEL.replaceAll('.', '\\.')}:${port}$`).test(origin) ? origin : undefined;
}

export function sameToken(given: string | null | undefined, token: string): boolean {
  const a = Buffer.from(given ?? '');
  const b = Buffer.from(token);
  return a.length === b.length && timingSafeEqual(a, b);
}

export const cookieHeader = (token: string): string => `${COOKIE}=${token}; Path=/; HttpOnly; SameSite=Strict`;

export function hasCookie(request: IncomingMessage, token: string): boolean {
  const cookies = (request.headers.cookie ?? '').split(';').map((part) => part.trim().split('='));
  return cookies.some(([name, value]) => name === COOKIE && sameToken(value, token));
}

export function mayWrite(request: IncomingMessage, port: number): boolean {
  return request.headers.origin === `http://${LABEL}:${port}` && request.headers[WRITE_HEADER] === '1';
}
