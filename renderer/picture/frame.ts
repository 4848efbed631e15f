import type { PictureOptions } from '../../shared-core/picture/options.ts';
import { colourMap } from '../colour/colourMap.ts';
import { cssColour, shellColours } from '../colour/shellColours.ts';
import type { Pen, Point } from '../cone/overlay/pen.ts';
import type { PictureNumbers } from './numbers.ts';
import { fitText, textWidth, wrapText } from './text/measure.ts';
import { writeLeft } from './text/writeLeft.ts';
import type { PictureTheme } from './themes.ts';
import type { ViewBox } from './views/view.ts';

const MARGIN = 38;
const TITLE_SIZES = [25, 21, 17.5] as const;
const TITLE_LINES = 2;
const KEY_SIZE = 11.5;
const CAPTION_SIZE = 10.5;
const CAPTION_LEADING = 15.5;
const MOST_CAPTION_LINES = 14;
const CREDIT_SIZE = 10;
const LEGEND_WIDTH = 190;
const LEGEND_STEPS = 64;

/** The paper of a picture and what stands on it outside the view. */
export interface PictureFrame {
  readonly width: number;
  readonly height: number;
  readonly title: string;
  readonly caption: string;
  readonly options: PictureOptions;
  readonly numbers: PictureNumbers;
  readonly theme: PictureTheme;
}

interface Heading {
  readonly size: number;
  readonly lines: readonly string[];
}

/** Where the view stands between heading and caption. */
export function viewBox(frame: PictureFrame): ViewBox {
  const top = headingBottom(frame) + 14;
  const bottom = frame.height - MARGIN - captionHeight(frame);
  return {
    left: MARGIN,
    top,
    width: frame.width - 2 * MARGIN,
    height: Math.max(120, bottom - top),
  };
}

/** Title, key of the shells, legend of the colours, caption and credit. */
export function paintFrame(pen: Pen, frame: PictureFrame): void {
  const { theme } = frame;
  const { size, lines } = heading(frame);
  let y = MARGIN;
  for (const line of lines) {
    y += size;
    writeLeft(pen, line, MARGIN, y, size, theme.ink, 600);
    y += size * 0.22;
  }
  paintLegend(pen, frame);
  paintKey(pen, frame, y + (lines.length > 0 ? 20 : KEY_SIZE));
  const caption = captionLinesOf(frame);
  let at = frame.height - MARGIN - captionHeight(frame) + 18;
  for (const line of caption) {
    at += CAPTION_LEADING;
    writeLeft(pen, line, MARGIN, at - 5, CAPTION_SIZE, theme.inkMuted);
  }
  const { credit } = frame.options;
  if (credit === '') return;
  const text = fitText(credit, frame.width - 2 * MARGIN, CREDIT_SIZE);
  const x = frame.width - MARGIN - textWidth(text, CREDIT_SIZE);
  writeLeft(pen, text, x, frame.height - MARGIN + 14, CREDIT_SIZE, theme.inkMuted);
}

function heading(frame: PictureFrame): Heading {
  if (frame.title.trim() === '') return { size: 0, lines: [] };
  const room = frame.width - 2 * MARGIN - (frame.numbers.colours.legend ? LEGEND_WIDTH + 40 : 0);
  for (const size of TITLE_SIZES) {
    const lines = wrapText(frame.title, room, size, 600);
    if (lines.length <= TITLE_LINES) return { size, lines };
  }
  const size = TITLE_SIZES[2];
  const lines = wrapText(frame.title, room, size, 600);
  const rest = lines.slice(TITLE_LINES - 1).join(' ');
  return { size, lines: [...lines.slice(0, TITLE_LINES - 1), fitText(rest, room, size, 600)] };
}

const showsKey = ({ options, numbers }: PictureFrame): boolean => options.shells && numbers.shells.length > 0;

function headingBottom(frame: PictureFrame): number {
  const { size, lines } = heading(frame);
  const title = lines.length * size * 1.22;
  const key = showsKey(frame) ? (lines.length > 0 ? 24 : KEY_SIZE) : 0;
  return MARGIN + Math.max(title + key, frame.numbers.colours.legend ? 40 : 0);
}

const captionLinesOf = (frame: PictureFrame): string[] => {
  if (frame.caption.trim() === '') return [];
  // A line is read with ease up to some hundred letters: wide pictures have a caption in columns' width.
  const width = Math.min(frame.width - 2 * MARGIN, 1080);
  const lines = wrapText(frame.caption, width, CAPTION_SIZE);
  if (lines.length <= MOST_CAPTION_LINES) return lines;
  const rest = lines.slice(MOST_CAPTION_LINES - 1).join(' ');
  return [...lines.slice(0, MOST_CAPTION_LINES - 1), fitText(rest, width, CAPTION_SIZE)];
};

function captionHeight(frame: PictureFrame): number {
  const lines = captionLinesOf(frame).length;
  return lines === 0 ? 6 : lines * CAPTION_LEADING + 14;
}

/** A swatch and the redshifts of each shell, in a row; where there is no room for all, ends and number alone. */
function paintKey(pen: Pen, frame: PictureFrame, y: number): void {
  if (!showsKey(frame)) return;
  const { numbers, theme } = frame;
  const colours = shellColours(numbers.shells.length, theme.mode);
  const room = frame.width - 2 * MARGIN - (numbers.colours.legend ? LEGEND_WIDTH + 40 : 0);
  const title = 'shells, z';
  let x = MARGIN;
  writeLeft(pen, title, x, y, KEY_SIZE, theme.inkMuted);
  x += textWidth(title, KEY_SIZE) + 16;
  const texts = numbers.shellInputs.map((shell) => shell.label);
  const widths = texts.map((text) => 9 + 6 + textWidth(text, KEY_SIZE) + 18);
  const total = widths.reduce((sum, w) => sum + w, 0);
  if (x - MARGIN + total > room) {
    const [first, last] = [numbers.shells[0]!, numbers.shells.at(-1)!];
    for (const colour of colours.slice(0, 40)) {
      swatch(pen, [x, y], cssColour(colour));
      x += 9;
    }
    writeLeft(pen, `${texts.length} from ${first.zMin} to ${last.zMax}`, x + 8, y, KEY_SIZE, theme.ink);
    return;
  }
  for (const [i, text] of texts.entries()) {
    swatch(pen, [x, y], cssColour(colours[i]!));
    writeLeft(pen, text, x + 15, y, KEY_SIZE, theme.ink);
    x += widths[i]!;
  }
}

function swatch(pen: Pen, [x, y]: Point, css: string): void {
  box(pen, x, y - 8.5, 9, 9, css);
}

function box(pen: Pen, x: number, y: number, width: number, height: number, css: string): void {
  const { context } = pen;
  context.beginPath();
  context.moveTo(x, y);
  context.lineTo(x + width, y);
  context.lineTo(x + width, y + height);
  context.lineTo(x, y + height);
  context.closePath();
  context.fillStyle = css;
  context.fill();
}

/** The colour map as a bar with its ends' values, at the top right. */
function paintLegend(pen: Pen, frame: PictureFrame): void {
  const { legend } = frame.numbers.colours;
  if (!legend) return;
  const { theme } = frame;
  const { bytes } = colourMap(legend.map, theme.mode);
  const x = frame.width - MARGIN - LEGEND_WIDTH;
  const y = MARGIN + 13;
  writeLeft(pen, fitText(legend.title, LEGEND_WIDTH, KEY_SIZE), x, MARGIN + 7, KEY_SIZE, theme.inkMuted);
  for (let i = 0; i < LEGEND_STEPS; i++) {
    const t = (i + 0.5) / LEGEND_STEPS;
    const at = 3 * Math.round(255 * (legend.reversed ? 1 - t : t));
    // Each piece reaches to the end and the next lies over it: no seams, whatever draws it.
    const from = (LEGEND_WIDTH * i) / LEGEND_STEPS;
    box(pen, x + from, y, LEGEND_WIDTH - from, 7, cssColour([bytes[at]!, bytes[at + 1]!, bytes[at + 2]!]));
  }
  writeLeft(pen, legend.low, x, y + 20, KEY_SIZE, theme.ink);
  writeLeft(
    pen,
    legend.high,
    x + LEGEND_WIDTH - textWidth(legend.high, KEY_SIZE),
    y + 20,
    KEY_SIZE,
    theme.ink,
  );
}
