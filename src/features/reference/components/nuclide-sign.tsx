/** ⁴⁰Ca as it is written, spoken as Ca-40. */
export function NuclideSign({ nuclide }: { nuclide: string }) {
  const [symbol = '', mass = ''] = nuclide.split('-');
  return (
    <>
      <span aria-hidden="true" className="whitespace-nowrap">
        <sup className="mr-px">{mass}</sup>
        {symbol}
      </span>
      <span className="sr-only">{nuclide}</span>
    </>
  );
}
