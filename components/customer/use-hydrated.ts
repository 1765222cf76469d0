'use client';
import { useSyncExternalStore } from 'react';

const never = () => () => undefined;

/** False until React has taken over. Apart from the desk's form pattern, whose libraries a customer never loads. */
export const useHydrated = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
