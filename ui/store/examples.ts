/** The cases that come with the program, loaded when asked for. */
const texts = import.meta.glob<string>(['../../cases/*.json', '!../../cases/*.schema.json'], {
  query: '?raw',
  import: 'default',
});

/** The case that a first visit shows. */
export const DEMO = 'acetone-absorber';

const nameOf = (path: string): string => path.replace(/^.*\//, '').replace(/\.json$/, '');

/** Names of all examples. */
export const EXAMPLES: readonly string[] = Object.keys(texts).map(nameOf);

/** Text of an example. Throws for a name that is none. */
export async function exampleText(name: string): Promise<string> {
  const path = Object.keys(texts).find((p) => nameOf(p) === name);
  const load = path === undefined ? undefined : texts[path];
  if (load === undefined) throw new RangeError(`no example ${name}`);
  return load();
}
