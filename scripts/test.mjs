// @ts-check
import { runCommand } from './lib/command.mjs';
import { runTests } from './lib/tests.mjs';

void runCommand({ main: () => runTests(process.argv.slice(2)), exitCodeOnSignal: 130 });
