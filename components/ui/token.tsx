'use client';

import { type CSSProperties, type KeyboardEvent, type ReactNode, useEffect, useId, useRef, useState } from 'react';

/**
 * An underlined word of a sentence that is a control. Click, Enter or Space opens it, Escape or a click elsewhere closes
 * it, and the focus comes back to the word.
 */
export function Token({
  text,
  label,
  style,
  className = '',
  children,
}: {
  text: ReactNode;
  /** what the word stands for, for a screen reader and as the heading of what opens */
  label: string;
  style?: CSSProperties;
  className?: string;
  /** what opens; `close` closes it and gives the focus back */
  children: (close: () => void) => ReactNode;
}) {
  const [open, setOpen] = useState(false);
  const id = useId();
  const root = useRef<HTMLSpanElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const panel = useRef<HTMLSpanElement>(null);

  const close = () => setOpen(false);

  useEffect(() => {
    if (!open) return;
    const own = panel.current;
    const word = button.current;
    own?.querySelector<HTMLElement>('input, select, textarea, button')?.focus();
    if (own) {
      // Kept inside the page: a word at the right edge opens to the left of its own place.
      const over = own.getBoundingClientRect().right - document.documentElement.clientWidth + 12;
      if (over > 0) own.style.transform = `translateX(${-over}px)`;
    }
    const outside = (event: PointerEvent) => {
      if (!root.current?.contains(event.target as Node)) setOpen(false);
    };
    document.addEventListener('pointerdown', outside);
    return () => {
      document.removeEventListener('pointerdown', outside);
      // What had the focus is gone with the panel: the word takes it back.
      if (document.activeElement === document.body || own?.contains(document.activeElement)) word?.focus({ preventScroll: true });
    };
  }, [open]);

  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === 'Escape' && open) {
      event.stopPropagation();
      close();
    }
  };

  return (
    <span ref={root} className="relative inline-block" onKeyDown={onKeyDown}>
      <button
        ref={button}
        type="button"
        aria-expanded={open}
        aria-haspopup="dialog"
        aria-controls={open ? id : undefined}
        aria-label={`${label}: ${typeof text === 'string' ? text : ''}`}
        style={style}
        className={`border-b-2 border-current px-px text-left font-sans text-[0.86em] font-[560] leading-[1.15] hover:bg-wash aria-expanded:bg-wash ${className}`}
        onClick={() => setOpen(!open)}
      >
        {text}
      </button>
      {open && (
        <span
          ref={panel}
          id={id}
          role="dialog"
          aria-label={label}
          className="absolute left-0 top-full z-30 mt-1.5 block w-max max-w-[min(22rem,calc(100vw-24px))] border border-ink bg-paper p-4 font-sans text-[15px] leading-normal text-ink"
        >
          <span className="mb-2.5 block text-[13px] text-soft">{label}</span>
          {children(close)}
        </span>
      )}
    </span>
  );
}
