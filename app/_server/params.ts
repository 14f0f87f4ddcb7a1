import 'server-only';
import { z } from 'zod';
import { idSchema } from '@/app/_shared/wire';

/** The one segment of a path that names a thing. */
export const idParams = z.object({ id: idSchema });
