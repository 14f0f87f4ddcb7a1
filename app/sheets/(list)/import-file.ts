import { attempt } from '@/app/_client/attempt';
import { failureText } from '@/app/_client/say-failure';
import { importSheet } from '@/app/sheets/actions';

/** No sheet comes near this; what is larger is refused before it is read. */
export const MAX_FILE_BYTES = 2_000_000;

export type ImportOutcome =
  | { readonly ok: true; readonly id: string; readonly name: string }
  | { readonly ok: false; readonly message: string };

/** Reads a file that someone chose or dropped, and makes a sheet of it; a refusal is a sentence that names the file. */
export async function importFile(file: File): Promise<ImportOutcome> {
  if (file.size > MAX_FILE_BYTES) {
    return refused(file, 'It is larger than a sheet can be (2 MB). Choose a file that was exported here.');
  }
  const text = await file.text().catch(() => null);
  if (text === null) return refused(file, 'It cannot be read. Check that it is still there, then try again.');
  const result = await attempt(() => importSheet({ text }));
  if (!result.ok) return refused(file, failureText(result.error));
  return { ok: true, id: result.value.id, name: result.value.name };
}

function refused(file: File, why: string): ImportOutcome {
  return { ok: false, message: `“${file.name}” was not imported. ${why}` };
}
