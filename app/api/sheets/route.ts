import { z } from 'zod';
import { success } from '@/app/_server/errors';
import { noParams, route } from '@/app/_server/route';
import { listSheetsInput } from '@/app/_shared/wire';
import { listSheets } from '@/db/queries/sheets';

const query = z.object({
  ...listSheetsInput.shape,
  archived: z
    .enum(['true', 'false'])
    .default('false')
    .transform((text) => text === 'true'),
});

/** The team's sheets: `?search=&sort=changed|name|created&archived=true|false`. */
export const GET = route(
  { name: 'sheet.list', permission: 'sheet.list', params: noParams, query },
  async ({ viewer, query: wanted }) => success(await listSheets(viewer, wanted)),
);
