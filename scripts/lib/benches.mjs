// @ts-check
import { existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import readline from 'node:readline';
import { ensureBuild } from './build.mjs';
import { firstPort, openDatabase } from './database.mjs';
import { chromium, mariadb } from './debian.mjs';
import { figureIn, figureTable } from './figures.mjs';
import { measureSecondStart } from './measure-start.mjs';
import { layoutOf, root } from './paths.mjs';
import { ended, launch, signalGroup, stopChild } from './processes.mjs';
import { Failure, say, sayOnStandardError, step } from './say.mjs';
import { readSettings } from './settings.mjs';
import { claimState, install, requireSpace } from './setup.mjs';
import { stopLater } from './shutdown.mjs';
import { serveTestDatabase } from './tests.mjs';

/** @typedef {import('./figures.mjs').Figure} Figure */

const folder = path.join(root, 'tests/bench');
const command = 'npm run bench';

/** The area that has a figure which is measured here, since only the set-up can start itself a second time. */
const startArea = 'app';

/** Areas that need no browser, no server and no database: what they measure runs in their own process. */
const bareAreas = new Set(['engine']);

/**
 * Measures the named areas, or all, and prints their figures. It judges none of them.
 *
 * @param {object} wanted
 * @param {readonly string[]} wanted.areas
 * @param {boolean} wanted.json one object a line on standard output, everything else on standard error
 * @returns {Promise<number>} exit code: 1 when a bench came to grief
 */
export async function runBenches({ areas, json }) {
  if (json) sayOnStandardError();
  const known = knownAreas();
  const unknown = areas.find((area) => !known.includes(area));
  if (unknown !== undefined) {
    throw new Failure(`There is no area "${unknown}" to measure; choose from ${known.join(', ')}.`);
  }
  const chosen = areas.length === 0 ? known : areas;

  const settings = readSettings();
  const layout = layoutOf(path.join(settings.stateDir, 'bench'));
  const served = chosen.filter((area) => !bareAreas.has(area));
  await claimState(layout, command);
  requireSpace(layout);
  const programs = settings.databaseUrl === null ? [mariadb, chromium] : [chromium];
  await install({ programs: served.length === 0 ? [] : programs, layout, command });
  if (served.length > 0) await ensureBuild({ command, logs: layout.logs, serve: true });
  const { NODE_ENV: _mode, NEXTAUTH_URL: _url, NEXTAUTH_SECRET: _secret, ...env } = settings.env;

  /** @type {Figure[]} */
  const figures = [];
  /** @type {string[]} */
  const troubles = [];
  /** @param {Figure} figure */
  const note = (figure) => {
    figures.push(figure);
    if (json) process.stdout.write(`${JSON.stringify(figure)}\n`);
  };

  if (chosen.includes(startArea)) {
    const value = await step(
      'Measuring a second npm start',
      // DATABASE_URL may name a database of the person's; these starts lay demonstration data and take a private one.
      () => measureSecondStart({ stateDir: path.join(layout.dir, 'start'), env: { ...env, DATABASE_URL: '' } }),
      () => 'Measured',
    ).catch((error) => {
      troubles.push(`${startArea}: ${error.message}`);
      return null;
    });
    if (value !== null) note({ area: startArea, name: 'start.second.s', value, unit: 's' });
  }

  /** @param {string} area @param {Readonly<Record<string, string | undefined>>} environment */
  const measureArea = async (area, environment) => {
    if (!existsSync(fileOf(area))) return;
    const code = await step(`Measuring ${area}`, () => measure(area, environment, note), () => `Measured ${area}`);
    if (code !== 0) troubles.push(`${area}: the bench ended with code ${code ?? 'none'}; its figures may be incomplete`);
  };
  // Before there is a server beside them to share the processor with.
  for (const area of chosen.filter((name) => bareAreas.has(name))) await measureArea(area, env);
  if (served.length > 0) {
    const { testUrl } = await openDatabase({ givenUrl: settings.databaseUrl, layout, preferredPort: firstPort.bench });
    const { baseUrl, application } = await serveTestDatabase({ layout, env, testUrl, preferredPort: 3300 });
    for (const area of served) await measureArea(area, { ...application, BASE_URL: baseUrl, OHMSTEAD_STATE: layout.dir });
  }

  if (!json) for (const line of ['', ...figureTable(figures)]) say(line);
  for (const trouble of troubles) say(`✗ ${trouble}`);
  return troubles.length === 0 ? 0 : 1;
}

/** @param {string} area */
const fileOf = (area) => path.join(folder, `${area}.ts`);

/** @returns {readonly string[]} */
function knownAreas() {
  const files = existsSync(folder) ? readdirSync(folder) : [];
  const areas = files.filter((name) => /^[^_.][^.]*\.ts$/.test(name)).map((name) => name.slice(0, -3));
  return [...new Set([...areas, startArea])].sort();
}

/**
 * Runs the bench of an area and passes each figure on as it is printed; what else it prints is for the person.
 *
 * @param {string} area
 * @param {Readonly<Record<string, string | undefined>>} env
 * @param {(figure: Figure) => void} note
 * @returns {Promise<number | null>} exit code
 */
async function measure(area, env, note) {
  const child = launch(process.execPath, ['--import', 'tsx', fileOf(area)], {
    cwd: root,
    env,
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const forget = stopLater({ stop: () => stopChild(child, 5000), kill: () => signalGroup(child.pid, 'SIGKILL') });
  const end = ended(child);
  if (child.stdout !== null) {
    for await (const line of readline.createInterface({ input: child.stdout })) {
      const figure = figureIn(line);
      if (figure === null) say(line);
      else note(figure);
    }
  }
  const { code } = await end;
  forget();
  return code;
}
