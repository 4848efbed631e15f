/** A text as YAML 1.1 and 1.2 read it: JSON's quotes. */
export const yamlText = (text: string): string => JSON.stringify(text);

/** A plain value (as of JSON) in YAML's flow style, on one line; what is undefined is left out. */
export function yamlValue(value: unknown): string {
  if (typeof value === 'string') return yamlText(value);
  if (typeof value === 'number') return yamlNumber(value);
  if (Array.isArray(value)) return `[${value.map(yamlValue).join(', ')}]`;
  if (typeof value === 'object' && value !== null) {
    const entries = Object.entries(value).filter(([, one]) => one !== undefined);
    return `{${entries.map(([key, one]) => `${key}: ${yamlValue(one)}`).join(', ')}}`;
  }
  return String(value ?? null);
}

/** YAML 1.1 takes 1e-7 for a text: its numbers with an exponent have a point and a sign (yaml.org/type/float.html). */
function yamlNumber(value: number): string {
  if (Number.isNaN(value)) return '.nan';
  if (!Number.isFinite(value)) return value > 0 ? '.inf' : '-.inf';
  const [mantissa, power] = String(value).split('e');
  return power === undefined ? mantissa! : `${mantissa!.includes('.') ? mantissa : `${mantissa}.0`}e${power}`;
}
