const LETTER = /\p{L}/u;
const RIGHT_TO_LEFT = /[\p{Script=Hebrew}\p{Script=Arabic}\p{Script=Syriac}\p{Script=Thaana}\p{Script=Nko}]/u;

/** Whether a text's first letter is of a writing system that runs from right to left (Unicode UAX #9, P2 and P3). */
export function isRightToLeft(text: string): boolean {
  for (const character of text) if (LETTER.test(character)) return RIGHT_TO_LEFT.test(character);
  return false;
}
