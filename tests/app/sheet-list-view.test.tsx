import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { SWRConfig } from 'swr';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { Result } from '@/app/_shared/result';
import type { SheetListItem } from '@/app/_shared/wire';
import { importSheet, archiveSheet, cloneSheet, createSheet, renameSheet, restoreSheet } from '@/app/sheets/actions';
import type { ListPermissions, SheetList } from '@/app/sheets/(list)/list-query';
import { SheetListView } from '@/app/sheets/(list)/sheet-list-view';
import { currentToasts, toast } from '@/components/toast';
import { Toaster } from '@/components/toaster';

const router = { push: vi.fn(), prefetch: vi.fn() };
vi.mock('next/navigation', () => ({ useRouter: () => router }));
vi.mock('@/app/sheets/actions', () => ({
  archiveSheet: vi.fn(),
  cloneSheet: vi.fn(),
  createSheet: vi.fn(),
  importSheet: vi.fn(),
  renameSheet: vi.fn(),
  restoreSheet: vi.fn(),
}));

const EVERYTHING: ListPermissions = {
  create: true,
  import: true,
  rename: true,
  clone: true,
  archive: true,
  restore: true,
  export: true,
};

function sheet(id: string, name: string, more: Partial<SheetListItem> = {}): SheetListItem {
  return {
    id,
    name,
    purpose: `What ${name} is for.`,
    revision: 3,
    changedAt: '2025-11-30T10:00:00.000Z',
    changedBy: 'Tomas Wren',
    createdAt: '2025-11-01T10:00:00.000Z',
    archived: false,
    partCount: 12,
    snapshotCount: 0,
    openNoteCount: 0,
    origin: null,
    ...more,
  };
}

const LOW_PASS = sheet('lowpass00001', 'Anti-alias low-pass');
const MATCH = sheet('match0000001', 'Transducer match');
const INLET = sheet('inlet0000001', 'Mains inlet filter');

/** What the server's list handler would answer, changed by the mocked actions. */
let onServer: SheetListItem[];
let asked: URL[];

beforeEach(() => {
  onServer = [LOW_PASS, MATCH, INLET];
  asked = [];
  vi.stubGlobal('fetch', async (path: string) => {
    const url = new URL(path, 'http://localhost');
    asked.push(url);
    const search = (url.searchParams.get('search') ?? '').toLowerCase();
    const archived = url.searchParams.get('archived') === 'true';
    const sheets = onServer.filter((one) => one.archived === archived && one.name.toLowerCase().includes(search));
    return Response.json({ ok: true, value: { sheets, more: false } } satisfies Result<SheetList>);
  });
});

afterEach(() => {
  for (const one of currentToasts()) toast.dismiss(one.id);
  vi.unstubAllGlobals();
  vi.resetAllMocks();
});

function show(may: ListPermissions = EVERYTHING, sheets: readonly SheetListItem[] = onServer) {
  const user = userEvent.setup();
  render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <SheetListView first={{ sheets, more: false }} may={may} />
      <Toaster />
    </SWRConfig>,
  );
  return user;
}

const rowNames = (): (string | null)[] =>
  screen
    .queryAllByRole('listitem')
    .flatMap((row) => [...row.querySelectorAll('[data-sheet-link]')])
    .map((link) => link.textContent);

const link = (name: string): HTMLElement => screen.getByRole('link', { name });
const inUse = (): HTMLElement => screen.getByRole('list', { name: 'Sheets' });

describe('finding', () => {
  test('a search is asked of the server, and its count is said aloud', async () => {
    const user = show();
    await user.type(screen.getByRole('searchbox'), 'match');
    await waitFor(() => expect(rowNames()).toEqual(['Transducer match']));
    expect(asked.at(-1)?.searchParams.get('search')).toBe('match');
    await waitFor(() => expect(screen.getByText('1 sheet for “match”').getAttribute('role')).toBe('status'));
  });

  test('a search without a hit says so and gives the whole list back in one press', async () => {
    const user = show();
    await user.type(screen.getByRole('searchbox'), 'nothing like it');
    await user.click(await screen.findByRole('button', { name: 'Show all sheets' }));
    await waitFor(() => expect(rowNames()).toHaveLength(3));
  });

  test('the order and the archive are asked of the server', async () => {
    onServer.push(sheet('old000000001', 'Old pump bank', { archived: true }));
    const user = show(EVERYTHING, [LOW_PASS, MATCH, INLET]);
    await user.selectOptions(screen.getByRole('combobox', { name: 'Order' }), 'Name');
    await waitFor(() => expect(asked.at(-1)?.searchParams.get('sort')).toBe('name'));
    await user.click(screen.getByRole('button', { name: 'Archive', pressed: false }));
    await waitFor(() => expect(rowNames()).toEqual(['Old pump bank']));
  });

  test('Ctrl K anywhere goes to the search field; a letter alone goes nowhere', async () => {
    const user = show();
    await user.keyboard('k');
    expect(document.activeElement).not.toBe(screen.getByRole('searchbox'));
    await user.keyboard('{Control>}k{/Control}');
    expect(document.activeElement).toBe(screen.getByRole('searchbox'));
  });
});

describe('from the keyboard', () => {
  test('arrows, Home and End go from row to row and stop at the ends', async () => {
    const user = show();
    link(LOW_PASS.name).focus();
    await user.keyboard('{ArrowUp}');
    expect(document.activeElement).toBe(link(LOW_PASS.name));
    await user.keyboard('{ArrowDown}');
    expect(document.activeElement).toBe(link(MATCH.name));
    await user.keyboard('{End}{ArrowDown}');
    expect(document.activeElement).toBe(link(INLET.name));
    await user.keyboard('{Home}');
    expect(document.activeElement).toBe(link(LOW_PASS.name));
  });

  test('F2 renames in place, and the focus comes back to the row', async () => {
    vi.mocked(renameSheet).mockImplementation(async ({ name }) => {
      onServer = onServer.map((one) => (one.id === MATCH.id ? { ...one, name } : one));
      return { ok: true, value: { name } };
    });
    const user = show();
    link(MATCH.name).focus();
    await user.keyboard('{F2}');
    await user.clear(screen.getByRole('textbox', { name: `New name of ${MATCH.name}` }));
    await user.keyboard('Horn match{Enter}');
    await waitFor(() => expect(document.activeElement).toBe(link('Horn match')));
    expect(renameSheet).toHaveBeenCalledExactlyOnceWith({ id: MATCH.id, name: 'Horn match' });
  });

  test('Escape leaves the name as it was, and asks nothing of the server', async () => {
    const user = show();
    link(MATCH.name).focus();
    await user.keyboard('{F2}Something else{Escape}');
    await waitFor(() => expect(document.activeElement).toBe(link(MATCH.name)));
    expect(renameSheet).not.toHaveBeenCalled();
  });

  test('Delete archives, and the focus goes to the row that takes its place', async () => {
    vi.mocked(archiveSheet).mockImplementation(async ({ id }) => {
      onServer = onServer.map((one) => (one.id === id ? { ...one, archived: true } : one));
      return { ok: true, value: { archived: true } };
    });
    const user = show();
    link(MATCH.name).focus();
    await user.keyboard('{Delete}');
    await waitFor(() => expect(rowNames()).toEqual([LOW_PASS.name, INLET.name]));
    await waitFor(() => expect(document.activeElement).toBe(link(INLET.name)));
  });
});

describe('a change shows at once', () => {
  test('and when the server refuses, what stood before stands again, with the reason', async () => {
    let answer: (result: Awaited<ReturnType<typeof renameSheet>>) => void = () => {};
    vi.mocked(renameSheet).mockImplementation(() => new Promise((resolve) => (answer = resolve)));
    const user = show();
    link(MATCH.name).focus();
    await user.keyboard('{F2}Horn match{Enter}');
    await waitFor(() => expect(rowNames()).toContain('Horn match'));
    answer({ ok: false, error: { code: 'unavailable', message: 'The server cannot reach its database.' } });
    await waitFor(() => expect(rowNames()).toContain(MATCH.name));
    expect(rowNames()).not.toContain('Horn match');
    expect(screen.getByText('The server cannot reach its database.')).toBeTruthy();
  });

  test('and when no answer comes at all, it is put back and said as well', async () => {
    vi.mocked(archiveSheet).mockRejectedValue(new TypeError('Failed to fetch'));
    const user = show();
    link(INLET.name).focus();
    await user.keyboard('{Delete}');
    expect(await screen.findByText(/The server does not answer/)).toBeTruthy();
    await waitFor(() => expect(rowNames()).toHaveLength(3));
  });

  test('what was archived comes back by the toast’s Undo', async () => {
    const setArchived = (id: string, archived: boolean): void => {
      onServer = onServer.map((one) => (one.id === id ? { ...one, archived } : one));
    };
    vi.mocked(archiveSheet).mockImplementation(async ({ id }) => {
      setArchived(id, true);
      return { ok: true, value: { archived: true } };
    });
    vi.mocked(restoreSheet).mockImplementation(async ({ id }) => {
      setArchived(id, false);
      return { ok: true, value: { archived: false } };
    });
    const user = show();
    link(INLET.name).focus();
    await user.keyboard('{Delete}');
    await user.click(await screen.findByRole('button', { name: 'Undo' }));
    await waitFor(() => expect(rowNames()).toContain(INLET.name));
    expect(restoreSheet).toHaveBeenCalledExactlyOnceWith({ id: INLET.id });
  });
});

describe('the row’s menu', () => {
  test('clones, and offers to open the clone', async () => {
    vi.mocked(cloneSheet).mockImplementation(async () => {
      onServer = [sheet('clone0000001', 'Transducer match (clone)'), ...onServer];
      return { ok: true, value: { id: 'clone0000001', name: 'Transducer match (clone)' } };
    });
    const user = show();
    await user.click(screen.getByRole('button', { name: `Actions for ${MATCH.name}` }));
    await user.click(await screen.findByRole('menuitem', { name: 'Clone' }));
    await user.click(await screen.findByRole('button', { name: 'Open' }));
    expect(router.push).toHaveBeenCalledWith('/sheets/clone0000001');
    expect(rowNames()).toContain('Transducer match (clone)');
  });

  test('holds only what the role may do', async () => {
    const reader: ListPermissions = {
      create: false,
      import: false,
      rename: false,
      clone: false,
      archive: false,
      restore: false,
      export: true,
    };
    const user = show(reader);
    expect(screen.queryByRole('button', { name: 'New sheet' })).toBeNull();
    expect(screen.queryByRole('button', { name: 'Import' })).toBeNull();
    await user.click(screen.getByRole('button', { name: `Actions for ${MATCH.name}` }));
    expect((await screen.findAllByRole('menuitem')).map((item) => item.textContent)).toEqual(['Export as a file']);
    await user.keyboard('{Escape}');
    link(MATCH.name).focus();
    await user.keyboard('{F2}{Delete}');
    expect(screen.queryByRole('textbox', { name: /New name/ })).toBeNull();
    expect(archiveSheet).not.toHaveBeenCalled();
  });
});

describe('a new sheet', () => {
  test('without a name is not asked of the server', async () => {
    const user = show();
    await user.click(screen.getByRole('button', { name: 'New sheet' }));
    await user.keyboard('   {Enter}');
    expect(screen.getByRole('textbox', { name: 'Name' }).getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByText('Give the sheet a name.')).toBeTruthy();
    expect(createSheet).not.toHaveBeenCalled();
  });

  test('is made and opened; the server’s refusal stands beside the field', async () => {
    vi.mocked(createSheet)
      .mockResolvedValueOnce({
        ok: false,
        error: { code: 'invalid', message: 'No.', fields: { name: 'A sheet name has at most 120 characters.' } },
      })
      .mockResolvedValueOnce({ ok: true, value: { id: 'fresh0000001' } });
    const user = show();
    await user.click(screen.getByRole('button', { name: 'New sheet' }));
    await user.keyboard('Notch{Enter}');
    expect(await screen.findByText('A sheet name has at most 120 characters.')).toBeTruthy();
    await user.keyboard('{Enter}');
    await waitFor(() => expect(router.push).toHaveBeenCalledWith('/sheets/fresh0000001'));
  });

  test('is offered in one press where there is none yet', async () => {
    onServer = [];
    const user = show();
    await user.click(screen.getByRole('button', { name: 'Begin the first sheet' }));
    expect(screen.getByRole('dialog', { name: 'New sheet' })).toBeTruthy();
  });
});

describe('importing', () => {
  const pick = (): HTMLElement => screen.getByLabelText('Sheet files to import');

  test('a file over 2 MB is refused at once, and never sent', async () => {
    const user = show();
    await user.upload(pick(), new File(['x'.repeat(2_000_001)], 'huge.json', { type: 'application/json' }));
    expect(await screen.findByText(/“huge.json” was not imported. It is larger than a sheet can be/)).toBeTruthy();
    expect(importSheet).not.toHaveBeenCalled();
  });

  test('the server’s refusal is said with the file’s name, and the list is as it was', async () => {
    vi.mocked(importSheet).mockResolvedValue({
      ok: false,
      error: { code: 'invalid', message: 'This is not a sheet file.' },
    });
    const user = show();
    await user.upload(pick(), new File(['{"a":1}'], 'other.json', { type: 'application/json' }));
    expect(await screen.findByText('“other.json” was not imported. This is not a sheet file.')).toBeTruthy();
    expect(importSheet).toHaveBeenCalledExactlyOnceWith({ text: '{"a":1}' });
    expect(rowNames()).toHaveLength(3);
  });

  test('a good file appears in the list and can be opened from the toast', async () => {
    vi.mocked(importSheet).mockImplementation(async () => {
      onServer = [sheet('import000001', 'Brought in'), ...onServer];
      return { ok: true, value: { id: 'import000001', name: 'Brought in' } };
    });
    const user = show();
    await user.upload(pick(), new File(['{}'], 'good.json', { type: 'application/json' }));
    await waitFor(() => expect(within(inUse()).getByRole('link', { name: 'Brought in' })).toBeTruthy());
    await user.click(screen.getByRole('button', { name: 'Open' }));
    expect(router.push).toHaveBeenCalledWith('/sheets/import000001');
  });

  test('a file dropped on the page is imported', async () => {
    vi.mocked(importSheet).mockResolvedValue({ ok: false, error: { code: 'invalid', message: 'Not a sheet.' } });
    show();
    const drop = new Event('drop', { bubbles: true, cancelable: true });
    const files = [new File(['{}'], 'dropped.json')];
    Object.defineProperty(drop, 'dataTransfer', { value: { types: ['Files'], files } });
    window.dispatchEvent(drop);
    expect(drop.defaultPrevented).toBe(true);
    expect(await screen.findByText('“dropped.json” was not imported. Not a sheet.')).toBeTruthy();
  });
});

test('where a clone came from leads there', () => {
  onServer = [
    sheet('clone0000002', 'Second crossover', {
      origin: { sheetId: MATCH.id, sheetName: MATCH.name, snapshotName: 'As agreed', revision: 4 },
    }),
  ];
  show();
  expect(link(MATCH.name).getAttribute('href')).toBe(`/sheets/${MATCH.id}`);
  expect(screen.getByText(/snapshot “As agreed”/)).toBeTruthy();
});

test('a list that cannot be read says why and can be asked for again', async () => {
  let down = true;
  const healthy = globalThis.fetch;
  vi.stubGlobal('fetch', async (path: string) =>
    down
      ? Response.json({ ok: false, error: { code: 'unavailable', message: 'The database does not answer.' } }, { status: 503 })
      : healthy(path),
  );
  const user = show();
  expect((await screen.findByRole('alert')).textContent).toContain('The database does not answer.');
  expect(rowNames()).toHaveLength(3);
  down = false;
  await user.click(screen.getByRole('button', { name: 'Try again' }));
  await waitFor(() => expect(screen.queryByRole('alert')).toBeNull());
});
