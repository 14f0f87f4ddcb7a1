// @ts-check
import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild, nextProgram } from './build.mjs';
import { firstPort, openDatabase, renewTestDatabase } from './database.mjs';
import { chromium, mariadb } from './debian.mjs';
import { layoutOf, root } from './paths.mjs';
import { freePort } from './ports.mjs';
import { prepareDatabase } from './prepare.mjs';
import { run } from './processes.mjs';
import { countCheck, countNotRun, countPlaywright, countVitest, summary } from './report.mjs';
import { Failure, duration, say, sayFailure, sentenceOf, step } from './say.mjs';
import { secretsOf } from './secrets.mjs';
import { readSettings } from './settings.mjs';
import { claimState, install, requireSpace } from './setup.mjs';
import { isStopping } from './shutdown.mjs';
import { keepRunning } from './supervise.mjs';
import { applicationEnvironment, startWeb } from './web.mjs';

/**
 * @typedef {import('./report.mjs').Count} Count
 * @typedef {import('./report.mjs').Row} Row
 * @typedef {import('./paths.mjs').Layout} Layout
 *
 * @typedef {object} Run what the parts of a run share
 * @property {Layout} layout
 * @property {import('./processes.mjs').Environment} env of the runners: the person's, without what would change a result
 * @property {string | null} givenUrl
 * @property {readonly string[]} args for the one runner that was chosen
 * @property {() => Promise<import('./database.mjs').Database>} database opened at its first use
 *
 * @typedef {object} Part
 * @property {string} name in the summary
 * @property {string} key by which `npm test -- key` chooses it
 * @property {(run: Run) => Promise<Count>} check
 */

const command = 'npm test';

/** @type {readonly Part[]} */
const parts = [
  { name: 'lint', key: 'lint', check: lint },
  { name: 'types', key: 'types', check: types },
  { name: 'unit and reference', key: 'unit', check: (run) => vitest(run, 'unit', {}) },
  { name: 'interface', key: 'ui', check: (run) => vitest(run, 'ui', {}) },
  { name: 'database', key: 'database', check: databaseTests },
  { name: 'browser', key: 'e2e', check: browserTests },
];

/**
 * Sets up and runs every part, also when one before it failed, and counts them together. With the key of a part as its
 * first argument it runs only that one and gives the rest to its runner.
 *
 * @param {readonly string[]} args
 * @returns {Promise<number>} exit code
 */
export async function runTests(args) {
  const [key, ...rest] = args;
  const chosen = key === undefined ? parts : parts.filter((part) => part.key === key);
  if (chosen.length === 0) {
    throw new Failure(`There is no part "${key}"; choose one of ${parts.map((part) => part.key).join(', ')}: npm test -- unit`);
  }
  /** @type {Row[]} */
  const rows = [];
  try {
    const run = await setUp(rest, chosen);
    for (const part of chosen) rows.push(await timed(part, run));
  } catch (error) {
    sayFailure(error);
    rows.push({ name: 'set-up', milliseconds: performance.now(), ...countNotRun(sentenceOf(error)) });
  }
  if (isStopping()) return 130;
  const { lines, failed } = summary(rows, duration);
  say();
  for (const line of lines) say(line);
  return failed === 0 ? 0 : 1;
}

/**
 * @param {Part} part
 * @param {Run} run
 * @returns {Promise<Row>}
 */
async function timed(part, run) {
  const start = performance.now();
  say(`\n=== ${part.name}`);
  let count;
  try {
    count = await part.check(run);
  } catch (error) {
    sayFailure(error);
    count = countNotRun(sentenceOf(error).split('\n')[0] ?? '');
  }
  return { name: part.name, milliseconds: performance.now() - start, ...count };
}

/**
 * @param {readonly string[]} args
 * @param {readonly Part[]} chosen
 * @returns {Promise<Run>}
 */
async function setUp(args, chosen) {
  const settings = readSettings();
  const layout = layoutOf(path.join(settings.stateDir, 'test'));
  await claimState(layout, command);
  requireSpace(layout);
  const keys = new Set(chosen.map((part) => part.key));
  await install({
    // The set-up's own tests start a private MariaDB whatever DATABASE_URL says.
    programs: [...(keys.has('unit') || settings.databaseUrl === null ? [mariadb] : []), ...(keys.has('e2e') ? [chromium] : [])],
    layout,
    command,
  });
  // What a person set for a server of their own would change what the tests see.
  const { NODE_ENV: _mode, NEXTAUTH_URL: _url, NEXTAUTH_SECRET: _secret, DATABASE_URL: _database, ...env } = settings.env;
  /** @type {Promise<import('./database.mjs').Database> | undefined} */
  let database;
  return {
    layout,
    env: { ...env, NEXT_TELEMETRY_DISABLED: '1' },
    givenUrl: settings.databaseUrl,
    args,
    database: () => (database ??= openDatabase({ givenUrl: settings.databaseUrl, layout, preferredPort: firstPort.test })),
  };
}

/** @param {string} name */
const bin = (name) => path.join(root, 'node_modules/.bin', name);

/**
 * @param {Run} run
 * @returns {Promise<Count>}
 */
async function lint({ env, args }) {
  const { code } = await run(bin('eslint'), ['.', '--max-warnings', '0', ...args], { cwd: root, env });
  if (code === 0) say('No lint findings.');
  return countCheck(code);
}

/**
 * @param {Run} run
 * @returns {Promise<Count>}
 */
async function types({ env }) {
  const typegen = await run(process.execPath, [nextProgram, 'typegen'], { cwd: root, env });
  if (typegen.code !== 0) return countCheck(typegen.code);
  // The second without the browser's types: what must run in Node alone may not use them.
  const whole = await run(bin('tsc'), ['--noEmit'], { cwd: root, env });
  const pure = await run(bin('tsc'), ['--noEmit', '-p', 'tsconfig.pure.json'], { cwd: root, env });
  if (whole.code === 0 && pure.code === 0) say('No type errors.');
  return countCheck(whole.code === 0 ? pure.code : whole.code);
}

/**
 * @param {Run} run
 * @param {'unit' | 'ui' | 'database'} project
 * @param {import('./processes.mjs').Environment} more
 * @returns {Promise<Count>}
 */
async function vitest({ layout, env, args }, project, more) {
  const report = freshReport(layout, project);
  const flags = ['--project', project, '--allowOnly=false', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const { code } = await run(bin('vitest'), ['run', ...flags, ...args], { cwd: root, env: { ...env, ...more } });
  const byName = args.some((arg) => arg === '-t' || arg.startsWith('--testNamePattern'));
  return countVitest(readReport(report), code, { skippedFail: !byName });
}

/**
 * @param {Run} run
 * @returns {Promise<Count>}
 */
async function databaseTests(run) {
  const { testUrl } = await run.database();
  await renewTestDatabase(testUrl);
  return vitest(run, 'database', { DATABASE_URL: testUrl });
}

/**
 * The browser tests, against a production build that serves a test database with nothing in it but the demonstration.
 *
 * @param {Run} shared
 * @returns {Promise<Count>}
 */
async function browserTests({ layout, env, args, database }) {
  await ensureBuild({ command, logs: layout.logs, serve: true });
  const { testUrl } = await database();
  const { baseUrl, application } = await serveTestDatabase({ layout, env, testUrl, preferredPort: 3100 });

  const report = freshReport(layout, 'playwright');
  const { code } = await run(bin('playwright'), ['test', '--forbid-only', ...args], {
    cwd: root,
    env: { ...application, BASE_URL: baseUrl, OHMSTEAD_STATE: layout.dir, PLAYWRIGHT_JSON_OUTPUT_NAME: report },
  });
  return countPlaywright(readReport(report), code);
}

/**
 * Makes a test database anew, prepares it, and starts the built application on it.
 *
 * @param {object} what
 * @param {Layout} what.layout
 * @param {import('./processes.mjs').Environment} what.env
 * @param {string} what.testUrl
 * @param {number} what.preferredPort
 */
export async function serveTestDatabase({ layout, env, testUrl, preferredPort }) {
  await renewTestDatabase(testUrl);
  const host = '127.0.0.1';
  const port = await freePort(host, preferredPort);
  const application = applicationEnvironment({
    env,
    mode: 'production',
    host,
    port,
    databaseUrl: testUrl,
    authSecret: secretsOf(layout).authSecret,
  });
  await prepareDatabase({ env: application, layout, stampFor: null });
  const start = () => startWeb({ mode: 'start', host, port, env: application, layout });
  const server = await step('Starting the web server', start, () => `The web server answers on port ${port}`);
  keepRunning({ what: 'The web server', first: server, startAgain: start });
  return { baseUrl: `http://localhost:${port}`, application };
}

/**
 * The place of a report, with no earlier one in it: a runner that dies must not be counted by its last run.
 *
 * @param {Layout} layout
 * @param {string} name
 */
function freshReport(layout, name) {
  mkdirSync(layout.dir, { recursive: true, mode: 0o700 });
  const file = path.join(layout.dir, `${name}.json`);
  rmSync(file, { force: true });
  return file;
}

/** @param {string} file */
function readReport(file) {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return null;
  }
}
