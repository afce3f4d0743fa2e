// The desk is one for the whole page.

import { createContext } from "preact";
import { useContext } from "preact/hooks";

import type { Desk } from "./desk";

export const DeskContext = createContext<Desk | undefined>(undefined);

export function useDesk(): Desk {
  return useContext(DeskContext)!;
}
