/** The mark: a sheaf of seven leaves, the front one a page with a turned corner, tied by one straw band. */
const LEAVES = [
  [-35, 43],
  [34, 47],
  [-23, 53],
  [23, 50],
  [-11.5, 55],
  [11.5, 57],
] as const

export function Mark({ size = 24, title }: { size?: number; title?: string }) {
  const named = title ? { role: 'img', 'aria-label': title } : { 'aria-hidden': true as const }
  return (
    <svg
      width={size}
      height={size * 1.16}
      viewBox="-41 -63 82 95"
      {...named}
      fill="#fff"
      stroke="var(--ink)"
      strokeLinejoin="round"
    >
      <title>{title ?? ''}</title>
      {LEAVES.map(([turn, tall]) => (
        <path key={turn} transform={`rotate(${turn})`} d={`M-5.6 27V${-tall}H5.6V27Z`} strokeWidth="2.8" />
      ))}
      <path d="M-8.4 30V-60H2.6L8.4 -54.2V30Z" strokeWidth="2.8" />
      <path d="M2.6 -60V-54.2H8.4M-4.4 -46H4.4M-4.4 -39.5H4.4M-4.4 -33H4.4M-4.4 -26.5H1" fill="none" strokeWidth="1.6" />
      <path d="M8 2 17 16.4l-4.8-1L10 20 4.6 3z" fill="var(--straw)" strokeWidth="2.2" />
      <path d="M-16.6 -6C-8 -3.8 8 -3.8 16.6 -6V6C8 8.2-8 8.2-16.6 6Z" fill="var(--straw)" strokeWidth="2.8" />
    </svg>
  )
}
