import fc, { type Arbitrary } from 'fast-check'

/** Pieces that have a meaning to YAML, to CSV, to units, to numbers, to terminals or to JavaScript. */
const pieces = fc.constantFrom(
  ...['[', ']', '{', '}', ': ', ', ', '- ', '\n', '\n  ', '"', "'", '#', '\t', '? ', '| ', '> ', '---\n', '...\n', ';'],
  ...['&a ', '*a', '<<: *a', '!!js/function ', '!!binary ', '!x ', '%YAML 1.1\n---\n', '%TAG ! x:\n---\n'],
  ...[
    '\u0000',
    '\uFEFF',
    '\r\n',
    '\r',
    '\uD800',
    '\u202E',
    '\u2028',
    '\u2212',
    '\u001B[2J',
    '\u0007',
    '\u00A0',
    '\u3000',
  ],
  ...['__proto__: ', 'constructor: ', 'toString', 'hasOwnProperty: ', 'length: '],
  ...[
    '0',
    '-',
    '1e400 V',
    '1e-400 V',
    '.inf',
    '.nan',
    'NaN',
    'Infinity',
    '0x10',
    '0o7',
    '1_000',
    '0,5 ohm',
    '5',
    'null',
    '~',
  ],
  ...[
    'yes',
    'no',
    'true',
    '100 khz',
    ' V',
    ' A/us',
    ' K/W',
    ' %',
    ' degC',
    ' s',
    'stage: boost\n',
    'id: x\n',
    'capture: ramp\n',
  ],
)

const wildNumber = fc
  .tuple(fc.constantFrom('', '-'), fc.integer({ min: 1, max: 9 }), fc.integer({ min: -30, max: 30 }))
  .map(([sign, digit, exponent]) => `${sign}${digit}e${exponent}`)

type Change = (text: string) => string

function at(text: string, where: number): number {
  return where % (text.length + 1)
}

/** Replaces one match of a pattern, chosen by number. */
function swapMatch(text: string, pattern: RegExp, which: number, replacement: (found: string) => string): string {
  const matches = [...text.matchAll(pattern)]
  const match = matches[which % Math.max(1, matches.length)]
  if (match === undefined) return text
  return text.slice(0, match.index) + replacement(match[0]) + text.slice(match.index + match[0].length)
}

const numberPattern = /\d+(?:\.\d+)?/g
const unitPattern = /(?<=\d )[A-Za-z%/]+/g
const keyPattern = /[a-z_]+(?=: )/g
const wordPattern = /[\w-]+/g

const insert: Arbitrary<Change> = fc
  .tuple(fc.nat(), fc.nat({ max: 12 }), pieces)
  .map(([where, length, piece]) => (text) => {
    const place = at(text, where)
    return text.slice(0, place) + piece + text.slice(place + length)
  })
const remove: Arbitrary<Change> = fc.tuple(fc.nat(), fc.nat({ max: 80 })).map(([where, length]) => (text) => {
  const place = at(text, where)
  return text.slice(0, place) + text.slice(place + length)
})
const copy: Arbitrary<Change> = fc
  .tuple(fc.nat(), fc.nat({ max: 200 }), fc.nat())
  .map(([from, length, to]) => (text) => {
    const [source, target] = [at(text, from), at(text, to)]
    return text.slice(0, target) + text.slice(source, source + length) + text.slice(target)
  })
const otherNumber: Arbitrary<Change> = fc
  .tuple(fc.nat(), fc.oneof(wildNumber, fc.constantFrom('0', '-0', '1', '-1', '1e-30', '1e30', '0.0', '00')))
  .map(
    ([which, other]) =>
      (text) =>
        swapMatch(text, numberPattern, which, () => other),
  )
const otherUnit: Arbitrary<Change> = fc
  .tuple(
    fc.nat(),
    fc.constantFrom('V', 'A', 's', 'ns', 'Hz', 'uH', '%', 'degC', 'K', 'khz', 'W', 'A/us', 'µs', 'Ω', '(V', 'V^2'),
  )
  .map(
    ([which, other]) =>
      (text) =>
        swapMatch(text, unitPattern, which, () => other),
  )
const otherKey: Arbitrary<Change> = fc.tuple(fc.nat(), fc.nat()).map(([one, other]) => (text) => {
  const keys = text.match(keyPattern) ?? []
  return swapMatch(text, keyPattern, one, (found) => keys[other % Math.max(1, keys.length)] ?? found)
})
const otherWord: Arbitrary<Change> = fc.tuple(fc.nat(), fc.nat()).map(([one, other]) => (text) => {
  const words = text.match(wordPattern) ?? []
  return swapMatch(text, wordPattern, one, (found) => words[other % Math.max(1, words.length)] ?? found)
})
const swapLines: Arbitrary<Change> = fc.tuple(fc.nat(), fc.nat()).map(([one, other]) => (text) => {
  const lines = text.split('\n')
  const [a, b] = [one % lines.length, other % lines.length]
  return lines.with(a, lines[b]!).with(b, lines[a]!).join('\n')
})
const repeatLine: Arbitrary<Change> = fc
  .tuple(fc.nat(), fc.constantFrom(2, 3, 100, 3000))
  .map(([which, times]) => (text) => {
    const lines = text.split('\n')
    const place = which % lines.length
    return lines.with(place, Array<string>(times).fill(lines[place]!).join('\n')).join('\n')
  })
const nest: Arbitrary<Change> = fc
  .tuple(fc.nat(), fc.constantFrom(2, 50, 300, 20_000), fc.constantFrom('[', '{a: ', '- ', '? ', 'a: '))
  .map(([where, depth, bracket]) => (text) => {
    const place = at(text, where)
    return text.slice(0, place) + bracket.repeat(depth) + text.slice(place)
  })
const lineEnds: Arbitrary<Change> = fc
  .constantFrom('\r\n', '\r', '\n\n', '\u2028')
  .map((end) => (text) => text.replaceAll('\n', end))
const mark: Arbitrary<Change> = fc.constant((text: string) => `\uFEFF${text}`)

const change: Arbitrary<Change> = fc.oneof(
  { weight: 4, arbitrary: insert },
  { weight: 2, arbitrary: remove },
  { weight: 1, arbitrary: copy },
  { weight: 6, arbitrary: otherNumber },
  { weight: 2, arbitrary: otherUnit },
  { weight: 2, arbitrary: otherKey },
  { weight: 2, arbitrary: otherWord },
  { weight: 1, arbitrary: swapLines },
  { weight: 1, arbitrary: repeatLine },
  { weight: 1, arbitrary: nest },
  { weight: 1, arbitrary: lineEnds },
  { weight: 1, arbitrary: mark },
)

/** A text with a few changes, now and then with bytes that are no text at all. */
export function mutated(text: string): Arbitrary<Uint8Array> {
  const bytes = fc.array(fc.tuple(fc.nat(), fc.integer({ min: 0, max: 255 })), { minLength: 1, maxLength: 4 })
  return fc
    .tuple(
      fc.array(change, { minLength: 1, maxLength: 4 }),
      fc.oneof({ weight: 12, arbitrary: fc.constant([]) }, { weight: 1, arbitrary: bytes }),
    )
    .map(([changes, broken]) => {
      const buffer = Buffer.from(changes.reduce((before, apply) => apply(before), text))
      for (const [where, value] of broken) if (buffer.length > 0) buffer[where % buffer.length] = value
      return buffer
    })
}
