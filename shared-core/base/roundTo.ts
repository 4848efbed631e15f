/** The number with so many significant digits, 1 to 100, and so few zeros at its end as String() then leaves. */
export const roundTo = (value: number, digits: number): number => Number(value.toPrecision(digits));
