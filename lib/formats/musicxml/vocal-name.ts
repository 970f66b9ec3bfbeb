const VOICES =
  /\b(soprano|sopran|mezzo|alto|alt|contralto|countertenor|treble|tenor|t[ée]nor|tenore|baritone|bariton|baryton|baritono|bass|basse|basso|voice|voices|vocals?|voix|voz|canto|chant|gesang|singstimme|choir|chorus|choeur|chœur|chor|coro|men|women|boys|girls|children|solo|solist)\b/iu;
const INSTRUMENTS =
  /\b(guitar|drum|trombone|sax|saxophone|clarinet|flute|recorder|viola|violin|violon|double|string|electric|horn|tuba|oboe|bassoon|trumpet|piano|organ|synth|fiddle|ukulele)\b/iu;

function words(name: string): string {
  return name.normalize("NFC").replace(/[\d().,/-]+/g, " ");
}

/** Whether a part's name is an instrument's. */
export function isInstrumentName(name: string): boolean {
  return INSTRUMENTS.test(words(name));
}

/**
 * Whether a part's name is a voice's. "Bass" and "alto" are instruments too; their second word
 * gives them away. Common practice, no source.
 */
export function isVocalName(name: string): boolean {
  return VOICES.test(words(name)) && !isInstrumentName(name);
}
