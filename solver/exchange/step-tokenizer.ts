/**
 * Reads the DATA section of a STEP file (ISO 10303-21:2016, clear text encoding) into instances whose arguments
 * are plain values. One pass, no recursion, linear in the length of the text; damaged instances are left out
 * and counted.
 */

export type StepValue =
  | number
  | string
  | null
  | { ref: number }
  | { enum: string }
  | { type: string; args: StepValue[] }
  | StepValue[];

export interface StepInstance {
  id: number;
  /** One entry for a simple instance; one a name for a complex one (external mapping). */
  records: { type: string; args: StepValue[] }[];
}

export interface StepFile {
  instances: Map<number, StepInstance>;
  /** Types named by the instances whose text could not be understood, or whose number was given twice. */
  damaged: string[][];
  /** false: the file stops before its END-ISO line */
  complete: boolean;
}

const MAX_DEPTH = 64;
const CAPITALS = /[A-Z][A-Z0-9_]*/g;

export function tokenizeStep(text: string): StepFile {
  const instances = new Map<number, StepInstance>();
  const damaged: string[][] = [];
  const complete = text.includes('END-ISO-10303-21');
  const begin = text.indexOf('DATA;');
  let at = begin < 0 ? 0 : begin + 5;
  const length = text.length;
  // A damaged statement may have swallowed its neighbours (a lost quote): begin again at the next line that starts
  // an instance, as long as the text has not been read too often; that keeps the work linear.
  let readAgain = 8 * length;
  while (at < length) {
    at = skipBlank(text, at);
    if (at >= length) break;
    const start = at;
    const end = endOfStatement(text, start);
    at = end + 1;
    if (text.charCodeAt(start) !== 35 /* # */) continue;
    const instance = parseInstance(text, start, end);
    if (instance && !instances.has(instance.id)) {
      instances.set(instance.id, instance);
      continue;
    }
    let lost = end;
    readAgain -= end - start;
    const line = text.indexOf('\n#', start + 1);
    if (!instance && readAgain > 0 && line > 0 && line < end) {
      lost = line;
      at = line + 1;
    }
    damaged.push(typesIn(text.slice(start, lost)));
  }
  return { instances, damaged, complete };
}

/** Words with an opening parenthesis after them: the types that a damaged text still shows. */
function typesIn(text: string): string[] {
  const types: string[] = [];
  for (const word of text.matchAll(CAPITALS)) {
    const after = word.index + word[0].length;
    if (
      text[after] === '(' ||
      text
        .slice(after, after + 8)
        .trimStart()
        .startsWith('(')
    )
      types.push(word[0]);
  }
  return types;
}

/** First position from `at` that is neither white space nor inside a comment. */
function skipBlank(text: string, at: number): number {
  for (;;) {
    const c = text.charCodeAt(at);
    if (c === 32 || (c >= 9 && c <= 13)) at++;
    else if (c === 47 && text.charCodeAt(at + 1) === 42) {
      const close = text.indexOf('*/', at + 2);
      if (close < 0) return text.length;
      at = close + 2;
    } else return at;
  }
}

/** Position of the semicolon that ends the statement, or the end of the text; strings and comments are passed over. */
function endOfStatement(text: string, at: number): number {
  const length = text.length;
  while (at < length) {
    const c = text.charCodeAt(at);
    if (c === 59) return at;
    if (c === 39) {
      const close = text.indexOf("'", at + 1);
      if (close < 0) return length;
      at = close + 1;
    } else if (c === 47 && text.charCodeAt(at + 1) === 42) {
      const close = text.indexOf('*/', at + 2);
      if (close < 0) return length;
      at = close + 2;
    } else at++;
  }
  return length;
}

const WORD = /[A-Za-z_!][A-Za-z0-9_]*/y;
const NUMBER = /[+-]?(?:\d+\.?\d*|\.\d+)(?:[Ee][+-]?\d+)?/y;
const ENUM = /\.([A-Za-z0-9_]+)\./y;
const REF = /#(\d{1,12})/y;

function match(pattern: RegExp, text: string, at: number): RegExpExecArray | null {
  pattern.lastIndex = at;
  return pattern.exec(text);
}

function parseInstance(text: string, start: number, end: number): StepInstance | null {
  const head = match(REF, text, start);
  if (!head) return null;
  const equals = skipBlank(text, start + head[0].length);
  if (text[equals] !== '=') return null;
  let at = skipBlank(text, equals + 1);
  const id = Number(head[1]);
  const records: { type: string; args: StepValue[] }[] = [];
  const isComplex = text[at] === '(';
  if (isComplex) at = skipBlank(text, at + 1);
  for (;;) {
    const word = match(WORD, text, at);
    if (!word) return null;
    at = skipBlank(text, at + word[0].length);
    const list = parseList(text, at, end);
    if (!list) return null;
    records.push({ type: word[0].toUpperCase(), args: list.values });
    at = skipBlank(text, list.at);
    if (!isComplex) return at >= end ? { id, records } : null;
    if (text[at] === ')') return { id, records };
    if (at >= end) return null;
  }
}

/** Parses `( … )` from `at` with an explicit stack; null when it is damaged or nested deeper than any real file. */
function parseList(text: string, at: number, end: number): { values: StepValue[]; at: number } | null {
  if (text[at] !== '(') return null;
  const root: StepValue[] = [];
  const stack: StepValue[][] = [root];
  at++;
  while (at < end) {
    at = skipBlank(text, at);
    const top = stack[stack.length - 1]!;
    const c = text.charCodeAt(at);
    if (c === 41) {
      stack.pop();
      at++;
      if (stack.length === 0) return { values: root, at };
    } else if (c === 40) {
      if (stack.length > MAX_DEPTH) return null;
      const list: StepValue[] = [];
      top.push(list);
      stack.push(list);
      at++;
    } else if (c === 44) at++;
    else if (c === 36 || c === 42) {
      top.push(null);
      at++;
    } else if (c === 39) {
      let value = '';
      for (;;) {
        const close = text.indexOf("'", at + 1);
        if (close < 0 || close >= end) return null;
        value += text.slice(at + 1, close);
        at = close + 1;
        if (text.charCodeAt(at) !== 39) break;
        value += "'";
      }
      top.push(decodeString(value));
    } else if (c === 34) {
      const close = text.indexOf('"', at + 1);
      if (close < 0 || close >= end) return null;
      top.push(text.slice(at + 1, close));
      at = close + 1;
    } else if (c === 35) {
      const ref = match(REF, text, at);
      if (!ref) return null;
      top.push({ ref: Number(ref[1]) });
      at += ref[0].length;
    } else if (c === 46 && !isDigit(text.charCodeAt(at + 1))) {
      const word = match(ENUM, text, at);
      if (!word) return null;
      top.push({ enum: word[1]!.toUpperCase() });
      at += word[0].length;
    } else if (isDigit(c) || c === 43 || c === 45 || c === 46) {
      const number = match(NUMBER, text, at);
      if (!number) return null;
      top.push(Number(number[0]));
      at += number[0].length;
    } else {
      const word = match(WORD, text, at);
      if (!word) return null;
      at = skipBlank(text, at + word[0].length);
      if (text.charCodeAt(at) === 40) {
        if (stack.length > MAX_DEPTH) return null;
        const typed = { type: word[0].toUpperCase(), args: [] as StepValue[] };
        top.push(typed);
        stack.push(typed.args);
        at++;
      } else top.push(word[0].toUpperCase() === 'NAN' ? NaN : word[0]);
    }
  }
  return null;
}

const isDigit = (c: number) => c >= 48 && c <= 57;

/** Strings of ISO 10303-21 §6.4.3: \X2\…\X0\ holds UTF-16 code units, \X\hh a Latin-1 letter, \S\c the upper half. */
function decodeString(value: string): string {
  if (!value.includes('\\')) return value;
  return value
    .replace(/\\X2\\((?:[0-9A-Fa-f]{4})+)\\X0\\/g, (_, hex: string) =>
      String.fromCharCode(...hex.match(/.{4}/g)!.map((h) => parseInt(h, 16))),
    )
    .replace(/\\X\\([0-9A-Fa-f]{2})/g, (_, hex: string) => String.fromCharCode(parseInt(hex, 16)))
    .replace(/\\S\\(.)/g, (_, c: string) => String.fromCharCode(c.charCodeAt(0) + 128))
    .replace(/\\\\/g, '\\');
}
