/** A symbol as it is printed: what follows an underscore stands lower ("D_C min"). */
export function Subscripted({ text }: { readonly text: string }) {
  const [, symbol, index, rest] = /^(\w+?)_(\w+)(.*)$/.exec(text) ?? [];
  return symbol === undefined ? (
    <span>{text}</span>
  ) : (
    <span>
      {symbol}
      <sub>{index}</sub>
      {rest}
    </span>
  );
}
