import { useSyncExternalStore } from "react";

const never = () => () => undefined;

/**
 * False until the page's script runs. A form that is sent before that would go the browser's own way, with
 * the password in the address; its button is disabled so long, which also holds back the Enter key.
 */
export function useReady(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}
