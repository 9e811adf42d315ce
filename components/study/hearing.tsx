/** The usual caution about hearing, as it is shown before the first sound and on the instrument list. It never calls a level safe. */
export function HearingCaution({ className = '' }: { className?: string }) {
  return (
    <div className={`text-[13.5px] leading-relaxed ${className}`}>
      <p>
        Percussion at close range can exceed safe levels. Measure, wear protection, keep your distance, take breaks. Playback starts
        quiet and is limited; turn it up with care, above all in headphones.
      </p>
      <p className="mt-1.5 text-soft">
        Limits in use: NIOSH 85 dBA over 8 hours, halved for each 3 dB more (100 dBA: 15 minutes); OSHA 90 dBA over 8 hours, halved for
        each 5 dB more. Your local rules and hearing-care professionals decide.
      </p>
    </div>
  );
}
