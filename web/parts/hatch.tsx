// Hatching is the sign of doubt. It is drawn, since backgrounds are not printed.

/** The pattern that all hatched areas of the page are filled with. */
export function HatchPattern() {
  return (
    <svg class="pattern" width="0" height="0" aria-hidden="true">
      <defs>
        <pattern id="hatch" width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <line class="stroke" x1="1" y1="0" x2="1" y2="5" />
        </pattern>
        <pattern id="cross" width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <path class="stroke" d="M1 0V4M0 1H4" fill="none" />
        </pattern>
      </defs>
    </svg>
  );
}

/** A hatched area that fills the element it stands in. */
export function Hatch({ className }: { className: string }) {
  return (
    <svg class={className} width="100%" height="100%" aria-hidden="true">
      <rect width="100%" height="100%" fill="url(#hatch)" />
    </svg>
  );
}

/** A gap in a line of text. */
export function Gap() {
  return (
    <svg class="gap" width="16" height="15" aria-hidden="true">
      <rect width="16" height="15" fill="url(#hatch)" />
    </svg>
  );
}
