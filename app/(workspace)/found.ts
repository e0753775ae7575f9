import { notFound } from 'next/navigation';
import { AppError } from '@/lib/server/errors';

/** For pages: what is not there, or not this person's to see, is the page that says so. */
export async function found<T>(reading: Promise<T>): Promise<T> {
  try {
    return await reading;
  } catch (error) {
    if (error instanceof AppError && (error.code === 'missing' || error.code === 'forbidden')) notFound();
    throw error;
  }
}
