import { expect, it } from 'vitest';
import { RecordingContext } from '../../../renderer/picture/recorder.ts';
import { fitText, textWidth, wrapText } from '../../../renderer/picture/text/measure.ts';
import { isRightToLeft } from '../../../renderer/picture/text/writing.ts';

it('knows the widths of Helvetica', () => {
  // Adobe, Core 14 AFM files, Helvetica and Helvetica-Bold: A 667/722, W 944/944, i 222/278, space 278/278.
  expect(textWidth('A', 1000)).toBe(667);
  expect(textWidth('A', 1000, 700)).toBe(722);
  expect(textWidth('W', 1000)).toBe(944);
  expect(textWidth('i', 1000)).toBe(222);
  expect(textWidth('i', 1000, 700)).toBe(278);
  expect(textWidth(' ', 1000)).toBe(278);
  expect(textWidth('0123456789', 10)).toBeCloseTo(55.6, 9);
});

it('breaks text into lines that fit, loses no letter, and shortens with an ellipsis', () => {
  const text = 'some words and averyveryverylongwordthatisbroken\nsecond paragraph';
  const lines = wrapText(text, 100, 12);
  for (const line of lines) expect(textWidth(line, 12)).toBeLessThanOrEqual(100);
  expect(lines.join('').replaceAll(' ', '')).toBe(text.replaceAll(/\s/g, ''));
  const short = fitText('a long line of text', 60, 12);
  expect(short.endsWith('…')).toBe(true);
  expect(textWidth(short, 12)).toBeLessThanOrEqual(60);
});

it('tells writing that runs from right to left', () => {
  expect(isRightToLeft('שלום z = 1')).toBe(true);
  expect(isRightToLeft('0.5 مجرة')).toBe(true);
  expect(isRightToLeft('cluster שלום')).toBe(false);
});

it('records drawing as items where the transformation puts them', () => {
  const context = new RecordingContext(10, 20);
  context.save();
  context.translate(5, 0);
  context.rotate(Math.PI / 2);
  context.strokeStyle = 'rgb(1 2 3 / 0.5)';
  context.beginPath();
  context.moveTo(1, 0);
  context.lineTo(2, 0);
  context.stroke();
  context.restore();
  context.fillStyle = '#0a0b0c';
  context.font = '600 10px x';
  context.textBaseline = 'middle';
  context.fillText('t', 0, 0);
  const [line, text] = context.items;
  expect(line).toMatchObject({ kind: 'path', stroke: { colour: [1, 2, 3], alpha: 0.5 } });
  const run = line?.kind === 'path' ? Array.from(line.runs[0]!) : [];
  for (const [i, wanted] of [15, 21, 15, 22].entries()) expect(run[i]).toBeCloseTo(wanted, 12);
  expect(text).toMatchObject({
    kind: 'text',
    x: 10,
    y: 23.5,
    size: 10,
    bold: true,
    paint: { colour: [10, 11, 12] },
  });
});
