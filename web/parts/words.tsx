// Words of the core as they are set: the indices of the trade go below the line.

import { Fragment } from "preact";

const index = /(?<![\w.])([uUk])_(val|num|input|D|interp|iter|grid)(?!\w)/;

/** A number stays with its sign and its unit. */
const unbroken = / [=<>≤≥] (?=[\d±+−])|± (?=\d)| %/g;

export function Words({ text }: { text: string }) {
  const pieces = text.replace(unbroken, (space) => space.replace(/ /g, "\u00a0")).split(index);
  return (
    <>
      {pieces.map((piece, i) =>
        i % 3 === 0 ? <Fragment key={i}>{piece}</Fragment> : i % 3 === 1 ? <i key={i}>{piece}</i> : <sub key={i}>{piece}</sub>,
      )}
    </>
  );
}
