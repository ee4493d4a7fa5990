import { notFound } from 'next/navigation';
import { AppError } from '@/lib/errors';

/** Turns "not there" and "not yours" into the same not-found page, so that neither tells of the other. */
export async function orNotFound<Value>(reading: Promise<Value | null>): Promise<Value> {
  try {
    const value = await reading;
    if (value !== null) return value;
  } catch (error) {
    const isHidden = error instanceof AppError && (error.code === 'not-found' || error.code === 'forbidden');
    if (!isHidden) throw error;
  }
  return notFound();
}
