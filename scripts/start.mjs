// @ts-check
import { runCommand } from './lib/command.mjs';
import { serve } from './lib/serve.mjs';

void runCommand({ main: () => serve('start', 'npm start'), exitCodeOnSignal: 0 });
