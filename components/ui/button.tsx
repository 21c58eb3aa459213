import type { ComponentPropsWithRef, ReactNode } from 'react';
import Link from 'next/link';
import { Glyph } from './glyph';
import type { GlyphName } from './glyph';

export type ButtonKind = 'primary' | 'quiet' | 'danger' | 'bare';
export type ButtonSize = 'normal' | 'capture';

// In the booth a filled surface is a lamp, so the primary button is drawn as a heavy outline there.
const inBooth =
  '[html[data-palette=booth]_&:not(:disabled)]:border-2 [html[data-palette=booth]_&:not(:disabled)]:bg-accent-wash [html[data-palette=booth]_&:not(:disabled)]:text-accent-hover';

const kinds: Record<ButtonKind, string> = {
  primary: `border-accent bg-accent text-on-accent hover:border-accent-hover hover:bg-accent-hover ${inBooth}`,
  quiet: 'border-line-strong bg-raised text-ink hover:border-accent hover:bg-accent-wash',
  danger: 'border-reject bg-raised text-reject hover:bg-reject hover:text-on-reject',
  bare: 'border-transparent text-accent hover:border-line-strong hover:bg-accent-wash',
};

const sizes: Record<ButtonSize, string> = { normal: 'min-h-10 px-4', capture: 'min-h-capture min-w-capture px-6 text-lg' };

const shape =
  'control inline-flex items-center justify-center gap-2 rounded border py-1 font-semibold transition-colors ' +
  'disabled:border-line-strong disabled:bg-sunken disabled:text-ink-soft';

function classes(kind: ButtonKind, size: ButtonSize): string {
  return `${shape} ${kinds[kind]} ${sizes[size]}`;
}

interface Look {
  kind?: ButtonKind;
  /** 'capture' is 48 px, for gloved fingers. */
  size?: ButtonSize;
  glyph?: GlyphName;
}

export type ButtonProps = ComponentPropsWithRef<'button'> &
  Look & { /** Shown as busy and not to be pressed again. */ busy?: boolean };

/** Does something here. Not a submit unless told so. */
export function Button({
  kind = 'quiet',
  size = 'normal',
  glyph,
  busy = false,
  type = 'button',
  disabled,
  children,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      disabled={disabled === true || busy}
      aria-busy={busy || undefined}
      className={`${classes(kind, size)} ${rest.className ?? ''}`}
    >
      {busy ? <Glyph name="half-disc" /> : glyph && <Glyph name={glyph} />}
      {children}
    </button>
  );
}

export type LinkButtonProps = Look & { href: string; children: ReactNode; download?: boolean; target?: string };

/** Goes somewhere, and looks like a button. A download or an address of the API is a plain anchor. */
export function LinkButton({ kind = 'quiet', size = 'normal', glyph, href, download, target, children }: LinkButtonProps) {
  const content = (
    <>
      {glyph && <Glyph name={glyph} />}
      {children}
    </>
  );
  if (download === true || href.startsWith('/api/')) {
    return (
      <a href={href} download={download} target={target} className={classes(kind, size)}>
        {content}
      </a>
    );
  }
  return (
    <Link href={href} target={target} className={classes(kind, size)}>
      {content}
    </Link>
  );
}
