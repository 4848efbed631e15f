import { Refusal } from '../base/refusal.ts';

/** RA may be written from -360 to 360 (so that a box can run from -10 to 10); it is taken modulo 360. */
export function checkRa(shape: string, name: string, raDeg: number): void {
  if (raDeg >= -360 && raDeg <= 360) return;
  throw new Refusal(
    `The ${shape}'s ${name} is ${raDeg} but must be a number of degrees from -360 to 360: correct it.`,
    'use',
  );
}

export function checkDec(shape: string, name: string, decDeg: number): void {
  if (decDeg >= -90 && decDeg <= 90) return;
  throw new Refusal(
    `The ${shape}'s ${name} is ${decDeg} but must be a number of degrees from -90 to 90: correct it.`,
    'use',
  );
}
