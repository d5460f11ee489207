import { z } from 'zod';
import { idSchema } from './parts';

export const createdAnswer = z.object({ id: idSchema });
