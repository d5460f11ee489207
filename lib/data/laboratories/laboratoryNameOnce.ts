import { Problem } from '@/lib/errors';
import { isUniqueViolation } from '../transaction';

export async function laboratoryNameOnce<T>(name: string, write: () => Promise<T>): Promise<T> {
  try {
    return await write();
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    const sentence = `There is already a laboratory called ${name} here.`;
    throw new Problem('conflict', sentence, { reason: 'name-taken', fields: { name: sentence } });
  }
}
