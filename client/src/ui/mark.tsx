/** The mark: a peg, head up. Takes the varnish of the light it stands in. */
export function Mark({ height = 30 }: { readonly height?: number }) {
  return (
    <svg width={height * 0.8} height={height} viewBox="0 0 24 30" fill="var(--varnish)" aria-hidden="true">
      <circle cx="12" cy="1.8" r="1.5" />
      <path d="M9.2 17.4C0 16.6-1.2 3 12 3.3 25.2 3 24 16.6 14.8 17.4Z" />
      <path d="M7 18.7h10" stroke="var(--varnish)" strokeWidth="2.4" strokeLinecap="round" />
      <path d="M9.6 20.5 10.7 30h2.6l1.1-9.5z" />
    </svg>
  );
}
