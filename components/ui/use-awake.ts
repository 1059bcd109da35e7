'use client';
import { useSyncExternalStore } from 'react';

const never = () => () => undefined;

/** False until the page's script runs. What is typed into a form before that would be lost, so it waits. */
export function useAwake(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}
