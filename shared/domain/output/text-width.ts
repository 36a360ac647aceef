/** Advance widths of Inter, thousandths of the size, from the space to the tilde. Read from the font files of @fontsource/inter 5.3.0. */
const ADVANCES = {
  regular: [
    281, 288, 466, 633, 642, 982, 644, 300, 365, 365, 501, 662, 288, 460, 288, 360, 631, 407, 610, 618, 646, 593, 620, 566, 619, 620, 288,
    302, 662, 662, 662, 511, 966, 690, 654, 730, 722, 601, 590, 746, 743, 269, 571, 672, 565, 903, 753, 765, 639, 765, 644, 642, 646, 744,
    690, 985, 682, 679, 629, 365, 360, 365, 471, 456, 323, 562, 612, 571, 612, 583, 370, 613, 591, 242, 242, 549, 242, 876, 591, 600, 612,
    612, 376, 528, 327, 591, 562, 818, 546, 562, 552, 426, 333, 426, 662,
  ],
  semibold: [
    252, 321, 523, 644, 650, 1004, 663, 326, 373, 373, 540, 673, 319, 465, 319, 379, 660, 423, 623, 636, 666, 612, 640, 576, 640, 640, 319,
    329, 673, 673, 673, 543, 999, 728, 659, 737, 722, 605, 588, 749, 746, 277, 580, 703, 565, 922, 759, 769, 645, 773, 652, 650, 660, 736,
    728, 1020, 720, 713, 652, 373, 379, 373, 481, 469, 351, 574, 624, 583, 624, 591, 389, 625, 612, 262, 262, 569, 262, 900, 612, 609, 624,
    624, 397, 549, 353, 612, 587, 839, 569, 588, 566, 455, 359, 455, 673,
  ],
} as const

export type TextWeight = keyof typeof ADVANCES

/** The sign between facts, narrower than most. */
const MIDDLE_DOT = { regular: 288, semibold: 319 } as const

/** Taken for a character that is not in the table. */
const OTHER_ADVANCE = 650

/** Width of a line of text set in Inter, mm, without kerning: within 3 % for plain Latin text, never used to measure a piece. */
export function textWidth(text: string, size: number, weight: TextWeight = 'regular'): number {
  let sum = 0
  for (const character of text)
    sum += character === '·' ? MIDDLE_DOT[weight] : (ADVANCES[weight][character.codePointAt(0)! - 32] ?? OTHER_ADVANCE)
  return (sum / 1000) * size
}

/** Breaks a text at its spaces into lines no wider than `width` mm; a single longer word stays whole. */
export function wrapText(text: string, size: number, width: number, weight: TextWeight = 'regular'): string[] {
  const lines: string[] = []
  let line = ''
  for (const word of text.split(/\s+/).filter(Boolean)) {
    const longer = line ? `${line} ${word}` : word
    if (line && textWidth(longer, size, weight) > width) {
      lines.push(line)
      line = word
    } else line = longer
  }
  return line ? [...lines, line] : lines
}
