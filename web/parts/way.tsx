// A way is a button that runs with the text of a sentence and breaks with it,
// which the browser's own buttons do not.

import type { ComponentChildren, HTMLAttributes, Ref } from "preact";

interface Shown extends HTMLAttributes<HTMLSpanElement> {
  act(): void;
  handle?: Ref<HTMLSpanElement>;
  children?: ComponentChildren;
}

export function Way({ act, handle, children, ...rest }: Shown) {
  return (
    <span
      role="button"
      tabIndex={0}
      ref={handle ?? null}
      onClick={act}
      onKeyDown={(event) => {
        if (event.key === "Enter" || event.key === " ") {
          event.preventDefault();
          act();
        }
      }}
      {...rest}
    >
      {children}
    </span>
  );
}
