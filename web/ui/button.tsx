import type { ButtonHTMLAttributes, ReactNode } from 'react'
import { Link } from 'react-router-dom'

type Kind = 'ink' | 'outline' | 'word'

/** One filled ink button a screen; others are outlines (under a thumb) or underlined words. */
const LOOK: Record<Kind, string> = {
  ink: 'bg-ink text-white px-4 min-h-[48px] text-2 font-[650] inline-flex items-center justify-center gap-1',
  outline: 'border-2 border-ink bg-transparent px-3 min-h-[48px] font-[650] inline-flex items-center justify-center gap-1',
  word: 'word min-h-[24px] inline-block text-left',
}

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  look?: Kind
}

export function Button({ look = 'outline', className = '', type = 'button', ...rest }: ButtonProps) {
  const off = 'aria-disabled:opacity-60 disabled:opacity-60 disabled:cursor-not-allowed'
  return <button type={type} className={`${LOOK[look]} ${off} ${className}`} {...rest} />
}

export function ButtonLink({
  to,
  look = 'outline',
  className = '',
  children,
}: {
  to: string
  look?: Kind
  className?: string
  children: ReactNode
}) {
  return (
    <Link to={to} className={`${LOOK[look]} ${look === 'word' ? '' : 'no-underline'} ${className}`}>
      {children}
    </Link>
  )
}
