/** The mark: a barn gable whose boards are a five-bar tally. Its name stands beside it, so it is silent itself. */
export function Mark({ className = 'size-8' }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 32 32"
      fill="none"
      stroke="currentColor"
      strokeWidth="2.4"
      strokeLinecap="round"
      strokeLinejoin="round"
      aria-hidden="true"
      className={`shrink-0 text-barn ${className}`}
    >
      <path d="M3 13.5 16 3l13 10.5V29H3z" />
      <path d="M8.8 15.5V25M13.6 15.5V25M18.4 15.5V25M23.2 15.5V25" />
      <path d="M6.4 23.8 25.6 16.6" />
    </svg>
  );
}
