/**
 * A rule's sentence with its `{places}` filled.
 * @throws Error where the sentence has a place for which no parameter came
 */
export function fillSentence(sentence: string, parameters: Readonly<Record<string, string>>): string {
  return sentence.replace(/\{(\w+)\}/g, (_place, name: string) => {
    const text = parameters[name];
    if (text === undefined) throw new Error(`The sentence "${sentence}" needs the parameter ${name}.`);
    return text;
  });
}

/** The names of a sentence's places, each once. */
export function placesOf(sentence: string): string[] {
  return [...new Set([...sentence.matchAll(/\{(\w+)\}/g)].map(([, name]) => name!))];
}
