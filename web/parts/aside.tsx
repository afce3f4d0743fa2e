// What may stay out of sight: entries that nobody said anything of, and the
// rest of a long list in the margin.

import type { ComponentChildren } from "preact";
import { useState } from "preact/hooks";

import type { Entry } from "../engine/types";

/** Tells which entries of a sentence about something are out of sight, and the button that brings them back. */
export function useAside(entries: Entry[], about: string): { hidden(entry: Entry): boolean; more: ComponentChildren } {
  const [whole, setWhole] = useState(false);
  const aside = entries.filter((entry) => entry.aside).length;
  return {
    hidden: (entry) => entry.aside && !whole,
    more: aside > 0 && (
      <button class="aside" aria-expanded={whole} aria-label={whole ? `less of ${about}` : `${aside} more that may be said of ${about}`} onClick={() => setWhole(!whole)}>
        {whole ? "less" : `${aside} more that may be said`}
      </button>
    ),
  };
}

/** The first of a list, and the rest folded under what they are. */
export function Folded({ children, most, what }: { children: ComponentChildren[]; most: number; what: string }) {
  if (children.length <= most + 1) {
    return <>{children}</>;
  }
  return (
    <>
      {children.slice(0, most)}
      <details class="more">
        <summary>
          {children.length - most} more {what}
        </summary>
        {children.slice(most)}
      </details>
    </>
  );
}
