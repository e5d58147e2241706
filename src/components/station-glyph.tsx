/** The four fixed stations of a case, in the order of the beam. */
export const STATIONS = ['beam', 'target', 'interaction', 'detectors'] as const;
export type Station = (typeof STATIONS)[number];

const PATHS: Record<Station, React.ReactNode> = {
  beam: (
    <>
      <path d="M3 12h13M12 7l5 5-5 5" />
      <circle cx="20.5" cy="12" r="1" />
    </>
  ),
  target: (
    <>
      <circle cx="12" cy="12" r="2.4" />
      <circle cx="12" cy="12" r="8.5" strokeDasharray="3.4 3.3" />
    </>
  ),
  interaction: <path d="M3 6h18M4 6c5 0 5 13 9 13 4 0 3-9 8-10" />,
  detectors: (
    <>
      <path d="M4 18 18 6M4 18l16-2M4 18 9 4" />
      <path d="m18 6 2 2M20 16l-.5 2.6M9 4 6.6 3" />
    </>
  ),
};

export function StationGlyph({ station, className }: { station: Station; className?: string }) {
  return (
    <svg
      viewBox="0 0 24 24"
      fill="none"
      stroke="currentColor"
      strokeWidth="2"
      strokeLinecap="round"
      strokeLinejoin="round"
      aria-hidden="true"
      className={className ?? 'size-4'}
    >
      {PATHS[station]}
    </svg>
  );
}
