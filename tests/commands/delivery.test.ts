import { describe, expect, it } from 'vitest'
import { chooseDelivery } from '../../src/commands/delivery.ts'
import { messageOf } from './session-double.ts'

const all = ['table', 'json', 'csv', 'markdown', 'svg'] as const

describe('the form of a result', () => {
  it('is a table on stdout where nothing else is asked for', () => {
    expect(chooseDelivery({}, all)).toEqual({ format: 'table', target: null, jsonOnStdout: false })
  })

  it.each([
    ['a.md', 'markdown'],
    ['a.csv', 'csv'],
    ['a.json', 'json'],
    ['a.svg', 'svg'],
    ['a.TXT', 'table'],
  ])('follows the ending of the file: %s', (output, format) => {
    expect(chooseDelivery({ output }, all)).toEqual({ format, target: output, jsonOnStdout: false })
  })

  it('keeps the document on stdout where --json and a .json file agree', () => {
    expect(chooseDelivery({ json: true, output: 'a.json' }, all)).toEqual({
      format: 'json',
      target: 'a.json',
      jsonOnStdout: true,
    })
  })

  it('refuses two forms at once', () => {
    expect(messageOf(() => chooseDelivery({ json: true, csv: true }, all))).toBe(
      'command line  option-unusable  --json --csv: these ask for different forms; wanted is one of them',
    )
  })

  it('refuses an ending that contradicts the form', () => {
    expect(messageOf(() => chooseDelivery({ json: true, output: 'a.csv' }, all))).toBe(
      'command line  option-unusable  -o: "a.csv" and --json ask for different forms; wanted is one form (leave --json out)',
    )
  })

  it('names the known endings, and the nearest, for one it does not know', () => {
    expect(messageOf(() => chooseDelivery({ output: 'a.jsn' }, all))).toBe(
      'command line  option-unusable  -o: the ending of "a.jsn" names no form; wanted is one of .html .md .csv .json .svg .txt (did you mean ".json"?)',
    )
  })

  it('says which forms a command has, and where the document is', () => {
    expect(messageOf(() => chooseDelivery({ output: 'a.html' }, all))).toBe(
      'command line  option-unusable  -o: this command does not write html; wanted is one of .md .csv .json .svg .txt (ebbwatt review writes the document)',
    )
  })
})
