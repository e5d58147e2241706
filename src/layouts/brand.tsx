import { Link } from 'react-router-dom';
import { Mark } from '#src/components/mark.tsx';

export function Brand() {
  return (
    <Link to="/" className="flex items-center gap-2.5 rounded text-ink">
      <Mark className="size-7.5" />
      <span className="font-display text-xl font-semibold tracking-tight">Tallybarn</span>
    </Link>
  );
}
