import type { ComponentProps, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router';

/** How much weight an action carries: one `primary` on a screen, `plain` for the rest, `text` inside a sentence or a row. */
export type ButtonWeight = 'primary' | 'plain' | 'text' | 'destructive';

const SHAPE =
  'inline-flex min-h-8 items-center justify-center gap-2 px-3.5 py-1 whitespace-nowrap border pointer-coarse:min-h-11';
const QUIET = 'disabled:border-rule disabled:bg-transparent disabled:text-ink-3 disabled:cursor-default';

const WEIGHTS: Record<ButtonWeight, string> = {
  primary: `${SHAPE} ${QUIET} border-brass bg-brass text-on-brass hover:border-ink`,
  plain: `${SHAPE} ${QUIET} border-ink bg-raised text-ink hover:border-brass`,
  destructive: `${SHAPE} ${QUIET} border-broken bg-raised text-broken hover:border-ink`,
  text: 'inline min-h-6 text-ink underline decoration-1 underline-offset-3 hover:decoration-2 hover:decoration-brass disabled:text-ink-3 disabled:no-underline',
};

interface ButtonProps extends ComponentProps<'button'> {
  /** @default 'plain' */
  weight?: ButtonWeight;
  /** The act is under way: the button stays in place, says so and takes no second click. */
  isBusy?: boolean;
  children: ReactNode;
}

/** A button; it never submits a form unless told so by `type="submit"`. */
export function Button({
  weight = 'plain',
  isBusy = false,
  type = 'button',
  className = '',
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      disabled={rest.disabled}
      aria-disabled={isBusy || undefined}
      aria-busy={isBusy || undefined}
      onClick={isBusy ? (event) => event.preventDefault() : rest.onClick}
      className={`${WEIGHTS[weight]} ${isBusy ? 'opacity-80' : ''} ${className}`}
    >
      {rest.children}
      {isBusy && <span aria-hidden="true">…</span>}
    </button>
  );
}

interface LinkButtonProps extends LinkProps {
  /** @default 'plain' */
  weight?: ButtonWeight;
}

/** A link that looks like a button: it goes somewhere and changes nothing. */
export function LinkButton({ weight = 'plain', className = '', ...rest }: LinkButtonProps) {
  return <Link {...rest} className={`${WEIGHTS[weight]} ${className}`} />;
}
