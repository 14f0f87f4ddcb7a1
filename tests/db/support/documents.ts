import { emptySheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';

/** A document that tells itself from others by its purpose. */
export function documentAbout(purpose: string): SheetDocument {
  return { ...emptySheetDocument(), purpose };
}
