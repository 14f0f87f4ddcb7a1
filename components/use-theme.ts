'use client';

import { useSyncExternalStore } from 'react';
import { appliedTheme, subscribeToTheme, type Theme } from './theme';

/** The theme as it stands, in every control that shows it. `theme` is what the server drew the page in. */
export function useTheme(theme: Theme): Theme {
  return useSyncExternalStore(subscribeToTheme, appliedTheme, () => null) ?? theme;
}
