'use client';

import { createContext, useContext } from 'react';
import { useStore } from 'zustand';
import type { SheetState, SheetStore } from '../store/sheet-store';

export const SheetContext = createContext<SheetStore | null>(null);

/** The store of the open sheet. @throws outside a `SheetContext`: that is a fault of the program. */
export function useSheetStore(): SheetStore {
  const store = useContext(SheetContext);
  if (!store) throw new Error('this component belongs inside an open sheet');
  return store;
}

/** A part of the open sheet's state. Keep selectors narrow: a component renders whenever its part changes. */
export function useSheet<T>(select: (state: SheetState) => T): T {
  return useStore(useSheetStore(), select);
}
