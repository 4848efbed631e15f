import { Refusal } from '../../shared-core/base/refusal.ts';

/** A number written by a person: the whole text must be one, and finite. */
function toNumber(text: string): number {
  return /^\s*[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?\s*$/.test(text) ? Number(text) : Number.NaN;
}

/** Reads the value of a numeric option. */
export function oneNumber(option: string): (text: string) => number {
  return (text) => {
    const value = toNumber(text);
    if (!Number.isFinite(value))
      throw new Refusal(`${option} is "${text}", expected a number such as 0.3: correct it.`, 'use');
    return value;
  };
}

/** Reads the value of an option that takes numbers separated by commas. */
export function numberList(option: string): (text: string) => number[] {
  return (text) =>
    text.split(',').map((part) => {
      const value = toNumber(part);
      if (!Number.isFinite(value))
        throw new Refusal(
          `${option} is "${text}", expected numbers separated by commas such as 0.5,1.4: "${part}" is none.`,
          'use',
        );
      return value;
    });
}
