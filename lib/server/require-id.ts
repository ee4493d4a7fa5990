import { AppError } from '@/lib/errors';

const form = /^[0-9a-f]{8}-(?:[0-9a-f]{4}-){3}[0-9a-f]{12}$/i;

/** An identifier from outside; one of another form names nothing, and the database need not be asked. */
export function requireId(value: string): string {
  if (!form.test(value)) throw new AppError('not-found');
  return value;
}
