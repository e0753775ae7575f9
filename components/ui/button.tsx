import Link from 'next/link';
import type { ComponentProps } from 'react';

type Tone = 'ink' | 'red' | 'blue';
interface Look {
  tone?: Tone;
  solid?: boolean;
  /** large: the one action of a page */
  size?: 'normal' | 'large';
}

const outline: Record<Tone, string> = {
  ink: 'border-ink text-ink',
  red: 'border-red text-red font-semibold',
  blue: 'border-blue text-blue',
};
const filled: Record<Tone, string> = {
  ink: 'border-ink bg-ink text-paper',
  red: 'border-red bg-red text-paper',
  blue: 'border-blue bg-blue text-paper',
};

/** The classes of a button, for whatever element has to look like one. */
export function buttonClass({ tone = 'ink', solid = false, size = 'normal' }: Look = {}): string {
  const box = size === 'large' ? 'min-h-12 px-6 text-[14px]' : 'min-h-6 px-2 text-body pointer-coarse:min-h-11 pointer-coarse:px-3';
  const face = solid ? `${filled[tone]} font-semibold` : `bg-paper ${outline[tone]}`;
  return `inline-flex items-center justify-center gap-2 border py-[3px] text-left no-underline ${box} ${face} cursor-pointer hover:underline hover:underline-offset-2 disabled:cursor-default disabled:border-dashed disabled:border-grey disabled:bg-paper disabled:text-grey disabled:no-underline`;
}

export type ButtonProps = Look & ComponentProps<'button'>;

export function Button({ tone, solid, size, className = '', type = 'button', ...rest }: ButtonProps) {
  return <button type={type} className={`${buttonClass({ tone, solid, size })} ${className}`} {...rest} />;
}

export function ButtonLink({ tone, solid, size, className = '', ...rest }: Look & ComponentProps<typeof Link>) {
  return <Link className={`${buttonClass({ tone, solid, size })} ${className}`} {...rest} />;
}

/** Looks like words with a rule below them: the lesser action beside a button. */
export function WordButton({ className = '', type = 'button', ...rest }: ComponentProps<'button'>) {
  return (
    <button
      type={type}
      className={`cursor-pointer text-left text-ink underline underline-offset-[3px] pointer-coarse:min-h-11 ${className}`}
      {...rest}
    />
  );
}
