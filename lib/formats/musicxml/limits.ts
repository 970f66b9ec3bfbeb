/** What a score may be at most. Real vocal scores stay far below; what goes beyond is refused, not cut. */
export const LIMITS = {
  /** Bytes of the file as uploaded. */
  fileBytes: 20 * 1024 * 1024,
  /** Bytes of the music once unpacked, counted while unpacking. */
  unpackedBytes: 32 * 1024 * 1024,
  archiveEntries: 200,
  /** Elements inside one another; MusicXML needs about a dozen. */
  depth: 64,
  parts: 200,
  /** Characters kept of a title or a part's name. */
  nameCharacters: 200,
  /** How often one stretch may be repeated, and bars added by repeats, before the road map is left alone. */
  passes: 20,
  repeatedBars: 5000,
  /** Decimal digits before and after the point in a duration. */
  durationDigits: 9,
  durationDecimals: 6,
} as const;
