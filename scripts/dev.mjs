// @ts-check
import { runCommand } from './lib/command.mjs';
import { serve } from './lib/serve.mjs';

void runCommand({ main: () => serve('dev', 'npm run dev'), exitCodeOnSignal: 0 });
