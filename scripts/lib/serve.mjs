// @ts-check
import { accountLines, readAccounts } from './accounts.mjs';
import { ensureBuild } from './build.mjs';
import { firstPort, openDatabase } from './database.mjs';
import { mariadb } from './debian.mjs';
import { layoutOf, shown } from './paths.mjs';
import { requirePort } from './ports.mjs';
import { prepareDatabase } from './prepare.mjs';
import { duration, say, step } from './say.mjs';
import { secretsOf } from './secrets.mjs';
import { readSettings } from './settings.mjs';
import { claimState, install, requireSpace } from './setup.mjs';
import { keepRunning } from './supervise.mjs';
import { addressOf, applicationEnvironment, startWeb } from './web.mjs';

/**
 * From whatever is there to an application that answers: the whole of `npm start` and `npm run dev`.
 *
 * @param {'start' | 'dev'} mode
 * @param {string} command what the person typed
 * @returns {Promise<'serving'>}
 */
export async function serve(mode, command) {
  const settings = readSettings();
  const { env, host, port, databaseUrl } = settings;
  const layout = layoutOf(settings.stateDir);

  await claimState(layout, command);
  requireSpace(layout);
  await requirePort(host, port, command);
  const demonstration = readAccounts();
  await install({ programs: databaseUrl === null ? [mariadb] : [], layout, command });

  const database = await openDatabase({ givenUrl: databaseUrl, layout, preferredPort: firstPort.serve });
  const application = applicationEnvironment({
    env,
    mode: mode === 'dev' ? 'development' : 'production',
    host,
    port,
    databaseUrl: database.url,
    authSecret: secretsOf(layout).authSecret,
  });
  await prepareDatabase({ env: application, layout, stampFor: database.stampFor });
  if (mode === 'start') await ensureBuild({ command, logs: layout.logs, serve: true });

  const startServer = () => startWeb({ mode, host, port, env: application, layout });
  const server = await step(
    mode === 'dev' ? 'Starting the development server' : 'Starting the web server',
    startServer,
    () => 'The web server answers',
  );
  keepRunning({ what: 'The web server', first: server, startAgain: startServer });

  const sinceStart = duration(performance.now());
  say();
  say(`Ohmstead is at ${application.NEXTAUTH_URL ?? addressOf(host, port)} (serving after ${sinceStart}). Ctrl-C stops it.`);
  if (mode === 'start') say(`What the server has to say is in ${shown(layout.webLog)}.`);
  say();
  for (const line of accountLines(demonstration)) say(line);
  return 'serving';
}
