/** Our sign: a surd whose bar is a dimension line, ended by an oblique tick. */
export function Logo({ className = 'h-7 w-7' }: { className?: string }) {
  return (
    <svg viewBox="0 0 32 32" className={className} aria-hidden="true" focusable="false">
      <path
        d="M3 18h3.5l4 8L17 8h11"
        fill="none"
        className="stroke-ruddle"
        strokeWidth="2.6"
        strokeLinejoin="bevel"
      />
      <path d="M28 4.5v7M25.4 10.6l5.2-5.2" fill="none" className="stroke-ink" strokeWidth="1.6" />
    </svg>
  );
}
