/** A word of an OBJ file and the line it stands on, counted from 1. */
export type ObjWord = { text: string; line: number };

/** One statement: its keyword, the line it begins on and its words. `openEnd`: the file ended inside it. */
export type ObjStatement = { keyword: string; line: number; words: ObjWord[]; openEnd: boolean };

/**
 * The statements of an OBJ text in order, comments and empty lines left out, lines that end in a backslash joined to the next.
 * @param text the file; lines may end in LF, CR or CRLF
 */
export function* objStatements(text: string): Generator<ObjStatement> {
  const lines = text.split(/\r\n|\n|\r/);
  // A byte order mark needs no care: it counts as white space.
  let words: ObjWord[] = [];
  const statement = (openEnd: boolean): ObjStatement => {
    const [keyword, ...rest] = words;
    return { keyword: keyword!.text, line: keyword!.line, words: rest, openEnd };
  };
  for (const [index, raw] of lines.entries()) {
    const hash = raw.indexOf('#');
    const body = (hash < 0 ? raw : raw.slice(0, hash)).trim();
    const goesOn = body.endsWith('\\');
    for (const word of (goesOn ? body.slice(0, -1) : body).split(/\s+/))
      if (word !== '') words.push({ text: word, line: index + 1 });
    if (goesOn) {
      if (index === lines.length - 1 && words.length > 0) yield statement(true);
      continue;
    }
    if (words.length > 0) yield statement(false);
    words = [];
  }
}

/** Statements of the format that carry no joint or strut of a frame. */
const IGNORED = new Set(
  (
    'vt vn vp o g s mg usemtl mtllib usemap maplib bevel c_interp d_interp lod shadow_obj trace_obj ctech stech call csh ' +
    'deg bmat step parm trim hole scrv sp end con p'
  ).split(' '),
);

/** Free-form curves and surfaces: geometry that is passed over, which people are told. */
const CURVED = new Set(['cstype', 'curv', 'curv2', 'surf']);

/** What a keyword means for a frame. */
export function objKeyword(keyword: string): 'joint' | 'line' | 'face' | 'ignored' | 'curved' | 'unknown' {
  if (keyword === 'v') return 'joint';
  if (keyword === 'l') return 'line';
  if (keyword === 'f' || keyword === 'fo') return 'face';
  if (CURVED.has(keyword)) return 'curved';
  return IGNORED.has(keyword) ? 'ignored' : 'unknown';
}
