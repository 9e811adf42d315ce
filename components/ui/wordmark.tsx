const WIDTHS = [62, 74, 86, 98, 110, 125];

/** The name, widening letter by letter. */
export function Wordmark({ className = '' }: { className?: string }) {
  return (
    <span className={className} role="img" aria-label="Sesqui">
      {[...'Sesqui'].map((letter, index) => (
        <span key={letter + index} aria-hidden style={{ fontStretch: `${WIDTHS[index]}%` }}>
          {letter}
        </span>
      ))}
    </span>
  );
}
