/*
 * Which sheet is open in this tab and by whom, outside React: for the page that stands in when React has failed, and
 * for the one that comes after a reload that failed. A tab's own memory, so that no other person's work is offered.
 */

export type OpenRoomMemory = { readonly userId: string; readonly sheetId: string; readonly sheetName: string };

const KEY = 'ohmstead.room';

let present: (OpenRoomMemory & { readonly text: () => string }) | null = null;

/** The room is open; `text` is the document on the sheet at any later moment. */
export function rememberRoom(room: OpenRoomMemory, text: () => string): void {
  present = { ...room, text };
  try {
    sessionStorage.setItem(KEY, JSON.stringify(room));
  } catch {
    // Then only this page remembers.
  }
}

/** Who had this sheet open in this tab, and what was on it, if this page still knows. */
export function recallRoom(sheetId: string): { readonly room: OpenRoomMemory; readonly text: string | null } | null {
  if (present?.sheetId === sheetId) return { room: present, text: textOf(present.text) };
  try {
    const room: unknown = JSON.parse(sessionStorage.getItem(KEY) ?? 'null');
    return isMemory(room) && room.sheetId === sheetId ? { room, text: null } : null;
  } catch {
    return null;
  }
}

function textOf(text: () => string): string | null {
  try {
    return text();
  } catch {
    return null;
  }
}

function isMemory(value: unknown): value is OpenRoomMemory {
  return (
    typeof value === 'object' &&
    value !== null &&
    'userId' in value &&
    typeof value.userId === 'string' &&
    'sheetId' in value &&
    typeof value.sheetId === 'string' &&
    'sheetName' in value &&
    typeof value.sheetName === 'string'
  );
}
