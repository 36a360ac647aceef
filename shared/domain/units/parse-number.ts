import type { Problem, Result } from './result'
import { fail, succeed } from './result'

/** Why a typed quantity was not understood. */
export type ParseProblemCode =
  'empty' | 'negative' | 'ambiguous-comma' | 'unknown-unit' | 'mixed-units' | 'not-a-number' | 'impossible-number' | 'not-whole'

/** A typed quantity that was not understood, with what to write instead. */
export interface ParseProblem extends Problem {
  readonly code: ParseProblemCode
  readonly todo: string
}

/** One number and the unit behind it as typed, lower case; an empty unit means none was typed. */
export interface ParsedTerm {
  readonly value: number
  readonly unit: string
}

const VULGAR: Readonly<Record<string, string>> = {
  '½': '1/2',
  '⅓': '1/3',
  '⅔': '2/3',
  '¼': '1/4',
  '¾': '3/4',
  '⅕': '1/5',
  '⅖': '2/5',
  '⅗': '3/5',
  '⅘': '4/5',
  '⅙': '1/6',
  '⅚': '5/6',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
}

/** Brings typographic fractions, dashes, primes and spaces to plain ones, lower case. */
export function plainText(text: string): string {
  return text
    .replace(/[½⅓⅔¼¾⅕⅖⅗⅘⅙⅚⅛⅜⅝⅞]/g, (sign) => ` ${VULGAR[sign]}`)
    .replace(/[\u2010-\u2015\u2212]/g, '-')
    .replace(/[\u2044\u2215]/g, '/')
    .replace(/[\u2033\u201c\u201d]|''|\u2019\u2019|\u2032\u2032/g, '"')
    .replace(/[\u2032\u2018\u2019]/g, "'")
    .replace(/\s+/g, ' ')
    .trim()
    .toLowerCase()
}

const problem = (code: ParseProblemCode, message: string, todo: string): { readonly ok: false; readonly problem: ParseProblem } =>
  fail({ code, message, todo })

const NUMBER = /^(?:(\d+)(?: *- *| +)(\d+) ?\/ ?(\d+)|(\d+) ?\/ ?(\d+)|(\d[\d.,]*|[.,]\d+))/
const UNIT = /^ ?([a-zµ°%"'²][a-zµ°%²]*(?: ?\/ ?[a-z]+)?)/

function decimal(digits: string): Result<number, ParseProblem> {
  const trimmed = digits.replace(/[.,]$/, '')
  const comma = /^(\d*),(\d+)$/.exec(trimmed)
  if (comma) {
    if (comma[2]!.length === 3) {
      return problem(
        'ambiguous-comma',
        `${trimmed} can be read as ${comma[1] || '0'}.${comma[2]} or as ${comma[1]}${comma[2]}.`,
        `Write ${comma[1] || '0'}.${comma[2]} or ${comma[1]}${comma[2]}.`,
      )
    }
    return succeed(Number(`${comma[1] || '0'}.${comma[2]}`))
  }
  if (/^\d*\.?\d+$/.test(trimmed)) return succeed(Number(trimmed))
  return problem(
    'not-a-number',
    `${digits} has more than one mark between its digits.`,
    'Write the number with one decimal mark, such as 1250.5.',
  )
}

function fraction(whole: string, top: string, bottom: string): Result<number, ParseProblem> {
  if (Number(bottom) === 0) return problem('impossible-number', `${top}/${bottom} has a zero below the line.`, 'Write the fraction again.')
  if (whole !== '' && Number(top) >= Number(bottom)) {
    return problem(
      'impossible-number',
      `${whole} ${top}/${bottom} is more than a whole behind a whole number.`,
      'Write the fraction again, such as 36 1/2.',
    )
  }
  return succeed(Number(whole) + Number(top) / Number(bottom))
}

/**
 * Splits a typed quantity into its terms: decimals with a point or a comma, fractions (`36 1/2`, `36-1/2`, `36½`), units behind
 * each number. A single comma with exactly three digits behind it is asked back, never guessed. A sign in front is kept when
 * `signed`, else refused.
 */
export function parseTerms(text: string, example: string, signed = false): Result<readonly ParsedTerm[], ParseProblem> {
  let rest = plainText(text)
  if (rest === '') return problem('empty', 'Nothing was typed.', `Type a value, such as ${example}.`)
  let sign = 1
  if (/^[+-]/.test(rest)) {
    if (rest.startsWith('-')) sign = -1
    rest = rest.slice(1).trimStart()
  }
  const terms: ParsedTerm[] = []
  while (rest !== '') {
    const found = NUMBER.exec(rest)
    if (!found) return problem('not-a-number', `“${text.trim()}” is not a number.`, `Write a number and its unit, such as ${example}.`)
    const number =
      found[1] !== undefined
        ? fraction(found[1], found[2]!, found[3]!)
        : found[4] !== undefined
          ? fraction('', found[4], found[5]!)
          : decimal(found[6]!)
    if (!number.ok) return number
    if (!Number.isFinite(number.value))
      return problem('impossible-number', `${found[0]} is too large to be meant.`, 'Write the number again.')
    rest = rest.slice(found[0].length)
    const unit = UNIT.exec(rest)
    if (unit) rest = rest.slice(unit[0].length)
    terms.push({ value: sign * number.value, unit: unit ? unit[1]!.replace(/ /g, '').replace(/\.$/, '') : '' })
    rest = rest.replace(/^[ .]+/, '')
  }
  if (sign < 0 && !signed && terms.some((term) => term.value !== 0)) {
    return problem(
      'negative',
      `${text.trim()} is below zero, which cannot be meant here.`,
      `Write it without the minus, such as ${example}.`,
    )
  }
  return succeed(terms)
}
