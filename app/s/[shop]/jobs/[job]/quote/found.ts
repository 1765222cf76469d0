import { notFound } from 'next/navigation';
import { toAppError } from '@/lib/platform/http/errors';

/** What is not in this shop looks like an address that leads nowhere. */
export async function found<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (toAppError(error).code === 'not-found') notFound();
    throw error;
  }
}
