import { subscriptShare } from './widths';

// Texts of a figure mark a subscript as "u_{val}". It becomes a span of its
// own, set smaller and lower; the text stays text.
const drop = 0.25; // of the font size

// inMarkup sets the subscripts of all texts of an SVG document.
export function inMarkup(svg: string): string {
  return svg.replace(/(<text[^>]*>)([^<]*_\{[^<]*)(?=<)/g, (_, open: string, content: string) => {
    const size = Number(/font-size[:=]\s*"?([\d.]+)/.exec(open)?.[1] ?? 12);
    return open + spans(content, size);
  });
}

// spans returns the content of a text whose odd pieces are subscripts: each
// goes down, and what follows it comes up again.
function spans(content: string, size: number): string {
  const dy = (drop * size).toFixed(1);
  return content
    .split(/_\{([^{}]*)\}/)
    .map((piece, i) => {
      if (piece === '' || i === 0) return piece;
      if (i % 2 === 0) return `<tspan dy="-${dy}">${piece}</tspan>`;
      return `<tspan dy="${dy}" font-size="${(subscriptShare * size).toFixed(1)}">${piece}</tspan>`;
    })
    .join('');
}

// inElement does the same for what a live chart has drawn into an element.
export function inElement(root: Element): void {
  for (const text of Array.from(root.querySelectorAll('text'))) {
    if (text.childElementCount > 0 || !text.textContent?.includes('_{')) continue;
    const holder = document.createElementNS('http://www.w3.org/2000/svg', 'svg');
    holder.innerHTML = inMarkup(text.outerHTML);
    text.replaceChildren(...Array.from(holder.firstElementChild?.childNodes ?? []));
  }
}
