import type { Request, Response } from 'express';
import { Problem } from './problem.js';

/**
 * Sends published bytes, which never change: strong ETag, Repr-Digest (RFC 9530), conditional requests and one range at a time
 * (RFC 9110), kept for ever by caches, never compressed on the way. `bytes` is asked for only when they are sent.
 */
export async function sendBytes(
  request: Request,
  response: Response,
  { digest, size, type, name, bytes }: PublishedBytes,
): Promise<void> {
  const etag = `"sha256-${digest}"`;
  response.set({
    ETag: etag,
    'Repr-Digest': `sha-256=:${Buffer.from(digest, 'hex').toString('base64')}:`,
    'Accept-Ranges': 'bytes',
    'Cache-Control': 'public, max-age=31536000, immutable, no-transform',
    'Content-Disposition': `attachment; filename="${name.replaceAll(/[^\w.-]/g, '_')}"`,
    'Content-Security-Policy': 'sandbox',
    'Content-Type': type,
  });
  if (request.fresh) {
    response.status(304).end();
    return;
  }
  const range = requestedRange(request, size, etag);
  if (range) response.status(206).set('Content-Range', `bytes ${range.start}-${range.end}/${size}`);
  const length = range ? range.end - range.start + 1 : size;
  response.set('Content-Length', String(length));
  if (request.method === 'HEAD') {
    response.end();
    return;
  }
  const whole = await bytes();
  response.end(range ? whole.subarray(range.start, range.end + 1) : whole);
}

export interface PublishedBytes {
  /** SHA-256, hexadecimal. */
  readonly digest: string;
  readonly size: number;
  readonly type: string;
  /** What to call the file. */
  readonly name: string;
  readonly bytes: () => Promise<Buffer>;
}

/** The one range asked for; null for the whole: no range, several, another unit, or If-Range of other bytes. */
function requestedRange(request: Request, size: number, etag: string): { start: number; end: number } | null {
  const condition = request.headers['if-range'];
  if (condition !== undefined && condition !== etag) return null;
  const ranges = request.range(size);
  if (ranges === -1) {
    const detail = `The range is outside the ${size} bytes there are.`;
    throw new Problem(416, 'range-outside', detail, { headers: { 'Content-Range': `bytes */${size}` } });
  }
  if (ranges === undefined || ranges === -2 || ranges.type !== 'bytes' || ranges.length !== 1) return null;
  return ranges[0] ?? null;
}
