import { defineCaution } from './define'

const note = (code: string, message: string, source: string, todo: string) =>
  defineCaution<Record<string, never>>(code, { severity: 'note', message: () => message, maker: message, source, todo })

/** When to take it off. On every care and wear sheet, and where a hold is chosen. */
export const takeItOff = note(
  'take-it-off',
  'Take it off when numb, breathless, dizzy or in pain.',
  'usual caution of the trade',
  'Say it at the fitting and on the care sheet.',
)

export const noMedicalDevice = note(
  'no-medical-device',
  'A garment of this kind is no medical device and treats nothing.',
  'usual caution of the trade; local law decides',
  'Send whoever needs support for their health to a licensed practitioner.',
)

export const noBuoyancyAid = note(
  'no-buoyancy-aid',
  'A garment of this kind is no buoyancy aid; bones and layers take up water.',
  'usual caution of the trade; local law decides',
  'Say it to whoever goes into water with it.',
)

export const nickel = note(
  'nickel',
  'Metal on the skin may give off nickel; at most .5 µg/cm² a week is allowed in the EU.',
  'REACH annex XVII entry 27 (read); local law decides',
  'Ask the supplier of hooks, eyelets and busks, and cover what touches skin.',
)

export const latex = note(
  'latex',
  'Some elastics hold natural rubber latex, to which people react.',
  'usual caution of the trade',
  'Ask the wearer, and ask the supplier of the elastic.',
)

export const waterSalt = note(
  'water-salt-chlorine',
  'Salt and chlorine rust steel and age elastane.',
  'usual caution of the trade',
  'Use bones that do not rust, cap them, rinse after wear, and test the cloth again as it ages.',
)

export const releaseInWater = note(
  'release-in-water',
  'In water the wearer must get out alone and quickly.',
  'usual caution of the trade',
  'Give it a closure that the wearer can reach and open; no loose lacing ends.',
)

/** Cords near children: a caution, because local law decides. */
export const cordsNearChildren = defineCaution<Record<string, never>>('cords-near-children', {
  severity: 'caution',
  message: () => 'No cords at the neck for children of 7 years or under, or 134 cm or under; elsewhere short and fastened.',
  maker: 'No loose cords on this garment.',
  source:
    'EN 14682 by a market authority’s page (read); the standard leaves out dancewear and theatrical costume, not swimwear; local law decides',
  todo: 'Close it without a cord, or sew its ends in.',
  private: true,
})
