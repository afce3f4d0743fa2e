// Widths of characters, so that every host lays a figure out alike, whatever
// fonts it has. They are the advance widths of a wide common sans serif
// (DejaVu Sans 2.37, read from a browser's canvas), in thousandths of the font
// size: narrower fonts leave a little room, and texts do not meet.

// From U+0020 to U+007E.
const ascii = [
  318, 401, 460, 838, 636, 950, 780, 275, 390, 390, 500, 838, 318, 361, 318, 337, 636, 636, 636, 636, 636, 636, 636, 636,
  636, 636, 337, 337, 838, 838, 838, 531, 1000, 684, 686, 698, 770, 632, 575, 775, 752, 295, 295, 656, 557, 863, 748, 787,
  603, 787, 695, 635, 611, 732, 684, 989, 685, 611, 685, 390, 337, 390, 838, 500, 500, 613, 635, 550, 635, 615, 352, 635,
  634, 278, 278, 579, 278, 974, 634, 612, 635, 635, 411, 521, 392, 634, 592, 818, 592, 592, 525, 636, 337, 636, 838,
];

const others: [characters: string, width: number][] = [
  ['\u202f', 200],
  ['′', 227],
  ['ι·‘’', 338],
  ['²³⁰¹⁴⁵⁶⁷⁸⁹″', 401],
  ['°–“”∂⁻', 528],
  ['αγεζκνξςτΓ', 660],
  ['−±×≤≥≈→∞', 838],
  ['—…', 1000],
];

// What is not listed: letters of other alphabets, and the square characters.
const letter = 660;
const square = 1000;

const known = new Map<string, number>();
ascii.forEach((width, i) => known.set(String.fromCharCode(32 + i), width));
for (const [characters, width] of others) {
  for (const character of characters) known.set(character, width);
}

function widthOf(character: string): number {
  return known.get(character) ?? (character >= '\u2e80' ? square : letter);
}

// subscriptShare is the size of a subscript to that of its text.
export const subscriptShare = 0.75;

// measureText returns the width of a text in px; font is "12px family" or
// "bold 12px family". Parts within "_{" and "}" are subscripts.
export function measureText(text: string, font?: string): { width: number } {
  const size = /([\d.]+)px/.exec(font ?? '');
  let share = 1;
  let width = 0;
  for (let i = 0; i < text.length; i++) {
    if (text.startsWith('_{', i)) {
      share = subscriptShare;
      i++;
    } else if (share !== 1 && text[i] === '}') {
      share = 1;
    } else {
      width += share * widthOf(text[i]);
    }
  }
  return { width: (width / 1000) * (size ? Number(size[1]) : 12) };
}
