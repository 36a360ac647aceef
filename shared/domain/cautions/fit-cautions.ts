import { fixedDecimal } from '../units/format'
import { defineCaution } from './define'

interface StiffnessFacts {
  readonly factor: number
  readonly learntOn: string
}

/** The cloth is taken stiffer or softer than tested, as a fitting taught. */
export const stiffnessLearnt = defineCaution<StiffnessFacts>('stiffness-learnt', {
  severity: 'note',
  message: ({ factor, learntOn }) =>
    `Every cloth is taken at ${fixedDecimal(factor, 2)} of its test, as the fitting of ${learntOn} taught.`,
  maker: 'The hold was corrected after a fitting.',
  figure: ({ factor }) => ({ value: factor, unit: 'ratio' }),
  source: 'pulls measured at the fitting; holds for the layer plan that was fitted',
  todo: 'Drop it when the layers change.',
})

/** A stiffness was learnt in other layers than these, where it says nothing. */
export const stiffnessElsewhere = defineCaution<StiffnessFacts>('stiffness-elsewhere', {
  severity: 'note',
  message: ({ factor, learntOn }) =>
    `The fitting of ${learntOn} taught a factor of ${fixedDecimal(factor, 2)} in other layers; in these it is not used.`,
  maker: 'A correction from a fitting is not used in these layers.',
  figure: ({ factor }) => ({ value: factor, unit: 'ratio' }),
  source: 'derived: one factor holds for one layer plan only',
  todo: 'Drop it, or fit these layers and take a pull.',
})

/** So far from the test that something else is wrong. */
export const stiffnessOdd = defineCaution<StiffnessFacts>('stiffness-odd', {
  severity: 'caution',
  message: ({ factor }) => `The fitting says ${fixedDecimal(factor, 2)} times the tested pull: that is no spread of cloth.`,
  maker: 'The hold was corrected after a fitting, by much.',
  figure: ({ factor }) => ({ value: factor, unit: 'ratio' }),
  source: 'setting: .5 to 2',
  todo: 'Pull a strip of this lot again, and look whether the plan is what was sewn.',
})
