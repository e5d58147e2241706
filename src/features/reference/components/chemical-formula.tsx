/** H2O with its counts lowered; an isotope in brackets raised before its symbol. */
export function ChemicalFormula({ formula }: { formula: string }) {
  // A lone isotope may be written without brackets, as 3He.
  const plain = formula.replace(/^(\d+)([A-Z][a-z]?)/, '[$1$2]');
  const parts = plain.split(/(\[\d+[A-Z][a-z]?\]|\d+(?:\.\d+)?)/).filter((part) => part !== '');
  return (
    <span className="block max-w-44 truncate font-mono text-sm" title={formula}>
      <span className="sr-only">{formula}</span>
      <span aria-hidden="true">
        {parts.map((part, place) => {
          const isotope = /^\[(\d+)([A-Z][a-z]?)\]$/.exec(part);
          if (isotope) {
            return (
              <span key={place}>
                <sup>{isotope[1]}</sup>
                {isotope[2]}
              </span>
            );
          }
          return /^\d/.test(part) ? <sub key={place}>{part}</sub> : <span key={place}>{part}</span>;
        })}
      </span>
    </span>
  );
}
