import { notFound } from 'next/navigation';
import { AppError } from '@/lib/server/errors';
import { JobParams } from '@/lib/shared/jobs';

/** The job's id in the address of a page; what never was one is a page that is not there. */
export async function jobIdIn(params: Promise<unknown>): Promise<string> {
  const read = JobParams.safeParse(await params);
  return read.success ? read.data.jobId : notFound();
}

/** For pages: what is not there, or not this person's to see, is the page that says so. */
export async function found<T>(reading: Promise<T>): Promise<T> {
  try {
    return await reading;
  } catch (error) {
    if (error instanceof AppError && (error.code === 'missing' || error.code === 'forbidden')) notFound();
    throw error;
  }
}
