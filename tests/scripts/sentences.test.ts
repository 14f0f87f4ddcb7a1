import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { accountLines, readAccounts } from '@/scripts/lib/accounts.mjs';
import { failureSentence as buildFailure } from '@/scripts/lib/build.mjs';
import { failureSentence as aptFailure, isDebian } from '@/scripts/lib/debian.mjs';
import { figureIn, figureTable } from '@/scripts/lib/figures.mjs';
import { reasonIn } from '@/scripts/lib/mariadb-log.mjs';
import { corresponds, failureSentence as npmFailure } from '@/scripts/lib/packages.mjs';
import { Failure, duration, sentenceOf } from '@/scripts/lib/say.mjs';
import { addressOf, endedSentence } from '@/scripts/lib/web.mjs';

let dir: string;
beforeEach(() => {
  dir = mkdtempSync(path.join(os.tmpdir(), 'sentences-'));
});
afterEach(() => rmSync(dir, { recursive: true, force: true }));

describe('the reason in a log of MariaDB', () => {
  it.each([
    ["[ERROR] Can't start server: Bind on TCP/IP port. Got error: 98: Address already in use"],
    ['[ERROR] Do you already have another server running on port: 3307 ?\n[ERROR] Bind on TCP/IP port: Address already in use'],
  ])('is the port: %s', (log) => {
    expect(reasonIn(log)).toEqual({ kind: 'port' });
  });

  it.each([
    ["[ERROR] InnoDB: Operating system error number 28 in a file operation.\n[ERROR] InnoDB: Error number 28 means 'No space left on device'", /disk is full/],
    ["[ERROR] mariadbd: Disk is full writing './mysql/x' (Errcode: 28 \"No space left on device\")", /disk is full/],
    ['[ERROR] InnoDB: preallocating 33554432 bytes for file ./ib_logfile101 failed with error 28', /disk is full/],
    ['[ERROR] InnoDB: Unable to lock ./ibdata1 error: 11', /another MariaDB server is using the same data directory/],
    ["[ERROR] mariadbd: Can't lock aria control file '/x/aria_log_control' for exclusive use, error: 11", /same data directory/],
    ["[ERROR] mariadbd: File '/x/aria_log.00000001' not found (Errcode: 13 \"Permission denied\")", /another account/],
  ])('is told in words: %s', (log, words) => {
    const reason = reasonIn(log);
    expect(reason.kind === 'other' && reason.clause).toMatch(words);
  });

  it('is its first error when it is none of the usual', () => {
    const log = '2026-01-01 0 [Note] begin\n2026-01-01 0 [ERROR] Unknown key "x".\n2026-01-01 0 [ERROR] Aborting\n';
    expect(reasonIn(log)).toEqual({ kind: 'other', clause: 'Unknown key "x"' });
    expect(reasonIn('')).toEqual({ kind: 'other', clause: 'it ended without giving a reason' });
  });
});

describe('what other programs say', () => {
  it('becomes one sentence for apt', () => {
    expect(aptFailure("E: You don't have enough free space in /var/cache/apt/archives/.", ['chromium'], 'l')).toMatch(/^The disk is full/);
    expect(aptFailure('Temporary failure resolving', ['chromium'], 'l')).toMatch(/archive could not be reached/);
    expect(aptFailure('E: Could not get lock /var/lib/dpkg/lock', ['chromium'], 'l')).toMatch(/Another program is installing/);
    expect(aptFailure('x\nE: Unable to locate package chromium\n', ['chromium'], 'l')).toBe(
      'apt-get could not install chromium: Unable to locate package chromium (the whole text is in l).',
    );
  });

  it('becomes one sentence for npm', () => {
    expect(npmFailure('npm error code ENOSPC\nnpm error syscall write', 'l')).toMatch(/disk became full/);
    expect(npmFailure('npm error code ENOTFOUND\n', 'l')).toMatch(/registry could not be reached/);
    expect(npmFailure('npm error code EUSAGE\nnpm error\nnpm error `npm ci` needs a lock file\n', 'l')).toBe(
      'npm ci failed: `npm ci` needs a lock file. The whole text is in l.',
    );
  });

  it('keeps the end of what the build said, and knows a full disk', () => {
    expect(buildFailure('a\nType error: x\n', 'l')).toContain('Type error: x');
    expect(buildFailure('ENOSPC: no space left on device, write', 'l')).toMatch(/disk became full/);
  });

  it('becomes one sentence for the web server', () => {
    expect(endedSentence('Error: listen EADDRINUSE: address already in use', 3000, 'l')).toMatch(/^Port 3000 was taken/);
    expect(endedSentence('ok\n⨯ Failed to start\n', 3000, 'l')).toContain('⨯ Failed to start');
  });
});

describe('a failure of our own', () => {
  it('is its sentence, a known system error is put in words, and the rest is named', () => {
    expect(sentenceOf(new Failure('So it is.'))).toBe('So it is.');
    expect(sentenceOf(Object.assign(new Error('x'), { code: 'ENOSPC' }))).toMatch(/^The disk is full/);
    expect(sentenceOf(Object.assign(new Error('x'), { code: 'EACCES', path: '/p' }))).toMatch(/may not write.*\/p/);
    expect(sentenceOf('odd')).toContain('odd');
  });

  it('has its times in seconds, then in minutes', () => {
    expect(duration(49)).toBe('0.0 s');
    expect(duration(59_900)).toBe('59.9 s');
    expect(duration(59_999)).toBe('1 min 0 s');
    expect(duration(125_000)).toBe('2 min 5 s');
  });
});

describe('Debian', () => {
  it('is known by its release file, and so is what is made from it', () => {
    expect(isDebian('PRETTY_NAME="Debian GNU/Linux 12"\nID=debian\n')).toBe(true);
    expect(isDebian('ID=ubuntu\nID_LIKE=debian\n')).toBe(true);
    expect(isDebian('ID="x"\nID_LIKE="ubuntu debian"\n')).toBe(true);
    expect(isDebian('ID=fedora\nNAME="not debian"\n')).toBe(false);
  });
});

describe('installed packages', () => {
  const entry = { version: '1.0.0', integrity: 'sha512-a' };
  const wanted = { packages: { '': { version: '0' }, 'node_modules/a': entry, 'node_modules/b': { ...entry, optional: true } } };

  it('correspond to the lock file when all are there but those for other systems', () => {
    expect(corresponds(wanted, { packages: { 'node_modules/a': entry } })).toBe(true);
    expect(corresponds(wanted, { packages: { 'node_modules/a': entry, 'node_modules/b': entry } })).toBe(true);
  });

  it('do not when one is missing, another version, another content, or besides', () => {
    expect(corresponds(wanted, { packages: { 'node_modules/b': entry } })).toBe(false);
    expect(corresponds(wanted, { packages: { 'node_modules/a': { ...entry, version: '1.0.1' } } })).toBe(false);
    expect(corresponds(wanted, { packages: { 'node_modules/a': { ...entry, integrity: 'sha512-b' } } })).toBe(false);
    expect(corresponds(wanted, { packages: { 'node_modules/a': entry, 'node_modules/c': entry } })).toBe(false);
  });

  it('do not when nothing is known of them', () => {
    expect(corresponds(wanted, {})).toBe(false);
  });
});

describe('the demonstration accounts', () => {
  const write = (content: unknown): string => {
    const file = path.join(dir, 'accounts.json');
    writeFileSync(file, typeof content === 'string' ? content : JSON.stringify(content));
    return file;
  };
  const account = { email: 'a@b.example', name: 'A B', role: 'owner' };

  it('are printed with their password, in columns', () => {
    const file = write({ password: 'pw', accounts: [account, { email: 'long@b.example', name: 'C', role: 'reviewer' }] });
    expect(accountLines(readAccounts(file))).toEqual([
      'Demonstration accounts, all with the password pw',
      '  owner     a@b.example     A B',
      '  reviewer  long@b.example  C',
    ]);
  });

  it.each([['{'], [{}], [{ password: 'pw', accounts: [] }], [{ password: '', accounts: [account] }], [{ password: 'pw', accounts: [{ ...account, role: 1 }] }]])(
    'are refused when the file holds %j',
    (content) => {
      expect(() => readAccounts(write(content))).toThrow(/db\/seeds\/accounts\.json.*restore it from version control/);
    },
  );

  it('are missed when the file is', () => {
    expect(() => readAccounts(path.join(dir, 'none'))).toThrow(/is missing or damaged/);
  });
});

describe('the address', () => {
  it('is localhost for this machine and for all of its networks', () => {
    expect(addressOf('127.0.0.1', 3000)).toBe('http://localhost:3000');
    expect(addressOf('0.0.0.0', 8080)).toBe('http://localhost:8080');
    expect(addressOf('192.168.1.5', 3000)).toBe('http://192.168.1.5:3000');
    expect(addressOf('fe80::1', 3000)).toBe('http://[fe80::1]:3000');
  });
});

describe('a figure of a bench', () => {
  it('is a line of JSON with area, name, value and unit', () => {
    expect(figureIn('{"area":"a","name":"n","value":1.5,"unit":"ms"}')).toEqual({ area: 'a', name: 'n', value: 1.5, unit: 'ms' });
  });

  it.each(['hello', '{', '{}', '{"area":"a","name":"n","value":null,"unit":"ms"}', '{"area":"a","name":"n","value":"1","unit":"ms"}'])(
    'is not %j',
    (line) => {
      expect(figureIn(line)).toBeNull();
    },
  );

  it('is shown to four digits', () => {
    expect(figureTable([{ area: 'app', name: 'x', value: 12.34567, unit: 'ms' }]).at(-1)).toMatch(/^app x\s+12\.35\s+ms$/);
  });
});
