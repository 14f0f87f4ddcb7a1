'use client';

import { createContext, useContext, useMemo } from 'react';
import type { Command, CommandContext, Screen } from '../commands/command';
import { mayRun } from '../commands/registry';
import { commandContext } from '../store/command-context';
import { useSheetStore } from './sheet-context';

export const ScreenContext = createContext<Screen | null>(null);

/** Runs commands from anywhere inside an open sheet: menus, buttons and keys all go through here. */
export function useCommands(): { context(): CommandContext; run(command: Command): void } {
  const store = useSheetStore();
  const screen = useContext(ScreenContext);
  return useMemo(() => {
    const context = () => {
      if (!screen) throw new Error('this component belongs inside a drawing');
      return commandContext(store, screen);
    };
    return {
      context,
      run(command: Command) {
        const now = context();
        if (mayRun(command, now)) void command.run(now);
      },
    };
  }, [store, screen]);
}
