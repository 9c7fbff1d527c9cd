// JSON (RFC 8259) with what a person needs when it is wrong: line and column, and every key that
// stands twice in one object. The platform's parser names neither.

/** Where and why the text stops being JSON. */
interface JsonFault {
  readonly line: number;
  readonly column: number;
  readonly expected: string;
  readonly received: string;
}

/** A key that stands twice in one object; the first value is kept. */
interface DuplicateKey {
  readonly path: readonly (string | number)[];
  readonly line: number;
  readonly column: number;
}

export type JsonResult =
  | { readonly ok: true; readonly value: unknown; readonly duplicates: readonly DuplicateKey[] }
  | { readonly ok: false; readonly fault: JsonFault };

/** Deeper nesting is refused: no case needs it, and recursion must end. */
const DEEPEST = 64;
const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
const BLANK = /[ \t\n\r]*/y;
// eslint-disable-next-line no-control-regex -- control characters are what JSON forbids in text
const PLAIN = /[^"\\\u0000-\u001f]*/y;
const ESCAPES: Readonly<Record<string, string>> = {
  '"': '"',
  '\\': '\\',
  '/': '/',
  b: '\b',
  f: '\f',
  n: '\n',
  r: '\r',
  t: '\t',
};
const LITERALS: readonly (readonly [string, unknown])[] = [
  ['true', true],
  ['false', false],
  ['null', null],
];

class Fault extends Error {
  constructor(
    readonly at: number,
    readonly expected: string,
  ) {
    super(expected);
  }
}

/** Parses JSON text; never throws. A byte order mark in front is passed over. */
export function parseJson(text: string): JsonResult {
  const reader = new JsonReader(text);
  try {
    const value = reader.document();
    return { ok: true, value, duplicates: reader.duplicates };
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    return {
      ok: false,
      fault: { ...position(text, error.at), expected: error.expected, received: glimpse(text, error.at) },
    };
  }
}

class JsonReader {
  readonly duplicates: DuplicateKey[] = [];
  readonly #text: string;
  readonly #path: (string | number)[] = [];
  #at = 0;

  constructor(text: string) {
    this.#text = text;
    if (text.startsWith('\uFEFF')) this.#at = 1;
  }

  document(): unknown {
    const value = this.#value();
    this.#blank();
    if (this.#at < this.#text.length) throw new Fault(this.#at, 'the end of the file');
    return value;
  }

  #value(): unknown {
    this.#blank();
    if (this.#path.length > DEEPEST) throw new Fault(this.#at, `at most ${DEEPEST} levels of nesting`);
    const next = this.#text[this.#at];
    if (next === '{') return this.#object();
    if (next === '[') return this.#list();
    if (next === '"') return this.#string();
    for (const [word, value] of LITERALS) {
      if (this.#text.startsWith(word, this.#at)) {
        this.#at += word.length;
        return value;
      }
    }
    const number = this.#match(NUMBER);
    if (number === '') throw new Fault(this.#at, 'a value: text in double quotes, a number, a list or an object');
    return Number(number);
  }

  #object(): Record<string, unknown> {
    const out: Record<string, unknown> = {};
    this.#at += 1;
    this.#blank();
    if (this.#text[this.#at] === '}') {
      this.#at += 1;
      return out;
    }
    for (;;) {
      this.#blank();
      const start = this.#at;
      if (this.#text[start] !== '"') throw new Fault(start, 'a key in double quotes');
      const key = this.#string();
      this.#blank();
      if (this.#text[this.#at] !== ':') throw new Fault(this.#at, 'a colon after the key');
      this.#at += 1;
      this.#path.push(key);
      const value = this.#value();
      if (Object.hasOwn(out, key)) {
        this.duplicates.push({ path: [...this.#path], ...position(this.#text, start) });
      } else {
        // Not an assignment: a key named `__proto__` stays a key.
        Object.defineProperty(out, key, { value, enumerable: true, configurable: true, writable: true });
      }
      this.#path.pop();
      if (this.#closes('}')) return out;
    }
  }

  #list(): unknown[] {
    const out: unknown[] = [];
    this.#at += 1;
    this.#blank();
    if (this.#text[this.#at] === ']') {
      this.#at += 1;
      return out;
    }
    for (;;) {
      this.#path.push(out.length);
      out.push(this.#value());
      this.#path.pop();
      if (this.#closes(']')) return out;
    }
  }

  /** Past a comma (false) or the closing bracket (true). */
  #closes(bracket: '}' | ']'): boolean {
    this.#blank();
    const next = this.#text[this.#at];
    if (next !== ',' && next !== bracket) throw new Fault(this.#at, `a comma or ${bracket}`);
    this.#at += 1;
    return next === bracket;
  }

  #string(): string {
    const start = this.#at;
    let out = '';
    this.#at += 1;
    for (;;) {
      out += this.#match(PLAIN);
      const next = this.#text[this.#at];
      if (next === '"') {
        this.#at += 1;
        return out;
      }
      if (next === undefined) throw new Fault(start, 'a closing double quote');
      if (next !== '\\') throw new Fault(this.#at, 'text on one line; write a line break as \\n');
      out += this.#escape();
    }
  }

  #escape(): string {
    const letter = this.#text[this.#at + 1] ?? '';
    const plain = ESCAPES[letter];
    if (plain !== undefined) {
      this.#at += 2;
      return plain;
    }
    const digits = this.#text.slice(this.#at + 2, this.#at + 6);
    if (letter !== 'u' || !/^[0-9a-fA-F]{4}$/.test(digits)) {
      throw new Fault(this.#at, 'an escape such as \\n, \\" or \\u00b0');
    }
    this.#at += 6;
    return String.fromCharCode(Number.parseInt(digits, 16));
  }

  #blank(): void {
    this.#match(BLANK);
  }

  #match(pattern: RegExp): string {
    pattern.lastIndex = this.#at;
    const found = pattern.exec(this.#text)?.[0] ?? '';
    this.#at += found.length;
    return found;
  }
}

function position(text: string, at: number): { line: number; column: number } {
  const before = text.slice(0, at);
  const lines = before.split('\n');
  return { line: lines.length, column: (lines.at(-1) ?? '').length + 1 };
}

function glimpse(text: string, at: number): string {
  const piece = text.slice(at, at + 20).split('\n')[0] ?? '';
  if (at >= text.length) return 'the end of the file';
  return piece === '' ? 'the end of the line' : JSON.stringify(piece);
}
