import './support/configuration';
import { describe, expect, it, vi } from 'vitest';
import { PERMISSIONS } from '@/app/_server/permissions';
import { doorsOf, isActionFile, isRouteFile, sourceFiles } from './support/doors';

vi.mock('next/headers', () => import('./support/browser'));

const sources = await sourceFiles();
const actionFiles = sources.filter(isActionFile);
const routeFiles = sources.filter(isRouteFile).filter(({ file }) => file !== 'app/api/auth/[...nextauth]/route.ts');

describe('every door of the server', () => {
  it('is found by this test', () => {
    expect(actionFiles.map(({ file }) => file)).toEqual([
      'app/(auth)/actions.ts',
      'app/account/actions.ts',
      'app/sheets/[id]/actions.ts',
      'app/sheets/actions.ts',
      'app/team/actions.ts',
    ]);
    expect(routeFiles.length).toBeGreaterThanOrEqual(8);
  });

  it.each([...actionFiles, ...routeFiles])('went through the wrapper: $file', async (source) => {
    const doors = await doorsOf(source);
    expect(doors.length).toBeGreaterThan(0);
    for (const door of doors) {
      expect(door.declaration, `${door.name} of ${door.file} is exported bare`).toBeDefined();
      expect(door.declaration?.kind).toBe(isActionFile(source) ? 'action' : 'handler');
    }
  });

  it('only ever reads, when it is a handler: a change comes through an action, whose origin the framework checks', async () => {
    const names = (await Promise.all(routeFiles.map(doorsOf))).flat().map((door) => door.name);
    expect(new Set(names)).toEqual(new Set(['GET']));
  });

  it('is public only where there can be no session yet', async () => {
    const doors = (await Promise.all([...actionFiles, ...routeFiles].map(doorsOf))).flat();
    const open = doors.filter((door) => door.declaration?.permission === 'public');
    expect(open.map((door) => door.declaration?.name).toSorted()).toEqual(['account.signUp', 'health']);
  });

  it('uses every permission of the table, and no door stands without one', async () => {
    const doors = (await Promise.all([...actionFiles, ...routeFiles].map(doorsOf))).flat();
    const used = new Set(doors.map((door) => door.declaration?.permission).filter((name) => name !== 'public'));
    expect([...used].toSorted()).toEqual(Object.keys(PERMISSIONS).toSorted());
  });

  it('is no function within a page that was made an action in passing', () => {
    const hidden = sources.filter((source) => !isActionFile(source) && /^\s+['"]use server['"]/m.test(source.text));
    expect(hidden.map(({ file }) => file)).toEqual([]);
  });
});
