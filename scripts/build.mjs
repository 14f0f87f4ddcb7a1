// @ts-check
import { ensureBuild } from './lib/build.mjs';
import { runCommand } from './lib/command.mjs';
import { layoutOf } from './lib/paths.mjs';
import { readSettings } from './lib/settings.mjs';
import { install } from './lib/setup.mjs';

const command = 'npm run build';

void runCommand({
  main: async () => {
    const layout = layoutOf(readSettings().stateDir);
    await install({ programs: [], layout, command });
    await ensureBuild({ command, logs: layout.logs, serve: false });
    return 0;
  },
  exitCodeOnSignal: 130,
});
