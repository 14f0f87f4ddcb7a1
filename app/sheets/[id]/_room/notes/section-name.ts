/** The Ledger's section that holds the notes: what it is folded and opened by. */
export const NOTES_SECTION = 'notes';
