// @ts-check
import { runBenches } from './lib/benches.mjs';
import { runCommand } from './lib/command.mjs';

// npm keeps `--json` for itself when it stands before `--`, and says so in the environment.
const args = process.argv.slice(2);
const json = args.includes('--json') || process.env.npm_config_json === 'true';

void runCommand({
  main: () => runBenches({ areas: args.filter((arg) => !arg.startsWith('--')), json }),
  exitCodeOnSignal: 130,
});
