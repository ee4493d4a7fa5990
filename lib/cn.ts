import { clsx, type ClassValue } from 'clsx';

/** Joins class names, leaving out what is false. */
export function cn(...values: ClassValue[]): string {
  return clsx(values);
}
