import { describe, expect, it } from 'vitest'
import { chooseDelivery, resultForms } from '../../src/commands/delivery.ts'
import { messageOf } from './session-double.ts'

describe('the form of a result', () => {
  it('is a table on stdout where nothing else is asked for', () => {
    expect(chooseDelivery({}, resultForms)).toEqual({ format: 'table', target: null, jsonOnStdout: false })
  })

  it.each([
    ['a.md', 'markdown'],
    ['a.csv', 'csv'],
    ['a.json', 'json'],
    ['a.svg', 'svg'],
    ['a.html', 'html'],
    ['a.TXT', 'table'],
  ])('follows the ending of the file: %s', (output, format) => {
    expect(chooseDelivery({ output }, resultForms)).toEqual({ format, target: output, jsonOnStdout: false })
  })

  it('keeps the document on stdout where --json and a .json file agree', () => {
    expect(chooseDelivery({ json: true, output: 'a.json' }, resultForms)).toEqual({
      format: 'json',
      target: 'a.json',
      jsonOnStdout: true,
    })
  })

  it('refuses two forms at once', () => {
    expect(messageOf(() => chooseDelivery({ json: true, csv: true }, resultForms))).toBe(
      'command line  option-unusable  --json --csv: these ask for different forms; wanted is one of them',
    )
  })

  it('refuses an ending that contradicts the form', () => {
    expect(messageOf(() => chooseDelivery({ json: true, output: 'a.csv' }, resultForms))).toBe(
      'command line  option-unusable  -o: "a.csv" and --json ask for different forms; wanted is one form (leave --json out)',
    )
  })

  it('names the known endings, and the nearest, for one it does not know', () => {
    expect(messageOf(() => chooseDelivery({ output: 'a.jsn' }, resultForms))).toBe(
      'command line  option-unusable  -o: the ending of "a.jsn" names no form; wanted is one of .html .md .csv .json .svg .txt (did you mean ".json"?)',
    )
  })

  it('says which forms a command has', () => {
    expect(messageOf(() => chooseDelivery({ output: 'a.html' }, ['table', 'json']))).toBe(
      'command line  option-unusable  -o: this command does not write html; wanted is one of .json .txt',
    )
  })
})
