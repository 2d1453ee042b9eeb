/** A rule's text as it is set: the engine writes its comparisons in ASCII. */
export function withSigns(text: string): string {
  return text.replaceAll('<=', '≤').replaceAll('>=', '≥').replaceAll(' - ', ' − ');
}
