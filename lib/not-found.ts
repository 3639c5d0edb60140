import 'server-only';
import { notFound } from 'next/navigation';
import { AppError } from './errors';

/** For pages: what the domain calls not found becomes the page that says so. */
export async function orNotFound<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof AppError && error.code === 'not_found') notFound();
    throw error;
  }
}
