import type { Selection } from '../document/selection';
import type { PartId, SheetDocument } from '../document/types';
import type { Turn } from '../geometry/placement';
import type { Point } from '../geometry/point';
import type { PartKind } from '../parts/registry';
import type { WireTarget } from './edits/wires';

/** What the hand holds: nothing, a part to be placed, or the loose end of a wire. */
export type Tool =
  | { readonly kind: 'select' }
  | { readonly kind: 'place'; readonly part: PartKind; readonly turn: Turn; readonly mirrored: boolean }
  | { readonly kind: 'wire'; readonly from: WireTarget | null; readonly corners: readonly Point[] }
  | { readonly kind: 'note' };

/** Which readings stand on the drawing. */
export type Showing = {
  readonly currents: boolean;
  readonly voltages: boolean;
  readonly powers: boolean;
  readonly nodes: boolean;
};

/** An edit: what undo will call it, the next document, and what is selected after it. */
export type Edit = {
  readonly label: string;
  readonly document: SheetDocument;
  readonly selection?: Selection;
  /** Edits in a row with the same gesture are one step for undo. */
  readonly gesture?: string;
  /** Spoken through the live region. */
  readonly say?: string;
};

/** The panels that a command can open. */
export type Panel = 'keys' | 'commands' | 'snapshot' | 'clone' | 'problems';

/** What a command may look at and do: the open sheet on one side, the screen around it on the other. */
export type CommandContext = {
  readonly document: SheetDocument;
  readonly selection: Selection;
  readonly tool: Tool;
  /** The keyboard's place on the grid; null while the pointer leads. */
  readonly cursor: Point | null;
  readonly mayEdit: boolean;
  readonly showing: Showing;
  readonly undoLabel: string | null;
  readonly redoLabel: string | null;
  apply(edit: Edit): void;
  select(selection: Selection): void;
  setTool(tool: Tool): void;
  setCursor(cursor: Point | null): void;
  setShowing(showing: Showing): void;
  undo(): void;
  redo(): void;
  say(text: string): void;
  freshId(): string;
  readonly screen: Screen;
};

/** What only the screen can do. */
export type Screen = {
  zoomIn(): void;
  zoomOut(): void;
  zoomToFit(): void;
  zoomToFull(): void;
  /** The middle of what is in view, in drawing units. */
  middle(): Point;
  /** Brings a place into view if it is not. */
  reveal(place: Point): void;
  /** What a wire would end on at a place. */
  targetAt(place: Point): WireTarget;
  writeClipboard(text: string): Promise<void>;
  readClipboard(): Promise<string>;
  /** Opens the editor of a part's main field beside it. */
  editPart(id: PartId): void;
  open(panel: Panel): void;
};

export type CommandGroup = 'Draw' | 'Edit' | 'Arrange' | 'Look' | 'Drive' | 'Sheet';

/** One record a command: menus, keys, the command list and tests all run the same one. */
export type Command = {
  readonly id: string;
  readonly name: string;
  readonly group: CommandGroup;
  /** What lists call it together with its likes: four arrows are one line in the list of keys. */
  readonly listedAs?: string;
  /** Such as `mod+z`, `shift+t`, `arrowleft`; `mod` is ⌘ on a Mac and Ctrl elsewhere. */
  readonly keys: readonly string[];
  /** Whether it changes the sheet, and so needs the right to; reading and looking are for everyone. */
  readonly edits: boolean;
  readonly when?: (context: CommandContext) => boolean;
  readonly run: (context: CommandContext) => void | Promise<void>;
};
