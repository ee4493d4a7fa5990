// Reading what was sent, no further than the stated limit.
import { AppError } from '@/lib/errors';

/** The text of a JSON body; refuses other media types, and stops reading at the limit whatever the length header says. */
export async function readJsonText(request: Request, limit: number): Promise<string> {
  const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase() ?? '';
  if (type !== 'application/json' && !type.endsWith('+json')) throw new AppError('unsupported-media');
  const tooLarge = () =>
    new AppError('too-large', undefined, { sentence: `The limit is ${limit.toLocaleString('en')} bytes.` });
  if (Number(request.headers.get('content-length') ?? 0) > limit) throw tooLarge();
  const chunks: Uint8Array[] = [];
  let size = 0;
  for await (const chunk of request.body ?? []) {
    size += chunk.byteLength;
    if (size > limit) throw tooLarge();
    chunks.push(chunk);
  }
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks));
  } catch {
    throw new AppError('invalid-input', 'not UTF-8', { sentence: 'The body is not UTF-8 text.' });
  }
}
