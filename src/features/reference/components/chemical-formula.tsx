/** H2O with its counts lowered; an isotope in brackets raised before its symbol. */
export function ChemicalFormula({ formula }: { formula: string }) {
  const parts = formula.split(/(\[\d+[A-Z][a-z]?\]|\d+(?:\.\d+)?)/).filter((part) => part !== '');
  return (
    <span className="font-mono text-sm whitespace-nowrap">
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
