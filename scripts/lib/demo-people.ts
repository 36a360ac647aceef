import type { MeasuredValues, MeasurementKey } from '../../shared/domain/body/types'
import type { FlagFields } from '../../server/db/queries/wearers'

/** People of the demo are invented, and so are their measurements. */
export interface DemoWearer {
  readonly name: string
  readonly bornOn: string | null
  readonly guardian: string | null
  readonly note: string | null
  readonly flags?: FlagFields
  readonly measurings: readonly {
    readonly measuredOn: string
    readonly note: string | null
    readonly cm: Readonly<Partial<Record<MeasurementKey, number>>>
  }[]
}

export interface DemoClient {
  readonly name: string
  readonly email: string | null
  readonly phone: string | null
  readonly note: string | null
  readonly wearers: readonly DemoWearer[]
}

const NOT_LENGTHS: ReadonlySet<MeasurementKey> = new Set(['shoulderSlope', 'mass', 'age'])

/** Centimetres as they are typed, kept beside the millimetres. */
export const fromCm = (cm: DemoWearer['measurings'][number]['cm']): MeasuredValues =>
  Object.fromEntries(
    (Object.entries(cm) as [MeasurementKey, number][]).map(([key, value]) => [
      key,
      { value: NOT_LENGTHS.has(key) ? value : Math.round(value * 100) / 10, typed: String(value) },
    ]),
  )

const noFlags = {
  pregnancy: false,
  nursing: false,
  reflux: false,
  breathing: false,
  circulation: false,
  child: false,
  practitionerAgreed: false,
}

export const DEMO_CLIENTS: readonly DemoClient[] = [
  {
    name: 'Lake Stage, production office',
    email: 'production@lakestage.example',
    phone: null,
    note: 'Summer season on the open-air stage. Invented for the demo.',
    wearers: [
      {
        name: 'Ilse Marenbach',
        bornOn: '1994-03-11',
        guardian: null,
        note: 'Heron in the second act; goes into the water to the knees.',
        measurings: [
          {
            measuredOn: '2026-06-02',
            note: 'Before the season.',
            cm: {
              bustGirth: 91.5,
              underbustGirth: 77.5,
              waistGirth: 72,
              highHipGirth: 90.5,
              hipGirth: 99,
              neckBaseGirth: 37,
              shoulderLength: 12.4,
              acrossBack: 34.8,
              acrossFront: 33,
              backWaistLength: 41,
              frontWaistLength: 45.3,
              neckShoulderToBustPoint: 26.6,
              sideWaistLength: 22,
              waistToHip: 20.5,
              bustPointDistance: 18.6,
              armscyeGirth: 39.5,
              stature: 169,
            },
          },
          {
            measuredOn: '2026-11-12',
            note: 'After rehearsals began.',
            cm: {
              bustGirth: 90,
              underbustGirth: 76,
              waistGirth: 70,
              highHipGirth: 89,
              hipGirth: 98,
              neckBaseGirth: 37,
              shoulderLength: 12.4,
              acrossBack: 35,
              acrossFront: 33,
              backWaistLength: 41,
              frontWaistLength: 45,
              neckShoulderToBustPoint: 26.5,
              sideWaistLength: 22,
              waistToHip: 20.5,
              bustPointDistance: 18.5,
              armscyeGirth: 39,
              stature: 169,
            },
          },
        ],
      },
      {
        name: 'Tomma Felsing',
        bornOn: '1988-09-25',
        guardian: null,
        note: 'Chorus.',
        flags: {
          ...noFlags,
          reflux: true,
          practitionerAgreed: true,
          purpose: 'Sets how firmly the bodice may hold.',
          consentNoted: true,
          consentBy: 'Tomma Felsing',
        },
        measurings: [
          {
            measuredOn: '2026-10-20',
            note: null,
            cm: {
              bustGirth: 98,
              underbustGirth: 83,
              waistGirth: 79,
              acrossBack: 36.5,
              sideWaistLength: 22,
              waistToHip: 21,
              hipGirth: 106,
              neckBaseGirth: 38,
              shoulderLength: 12.6,
              backWaistLength: 41.5,
              frontWaistLength: 46.5,
              neckShoulderToBustPoint: 28,
              bustPointDistance: 20,
              armscyeGirth: 42.5,
              stature: 167,
            },
          },
        ],
      },
    ],
  },
  {
    name: 'Annika Roswald',
    email: 'annika@roswald.example',
    phone: '+00 000 0142',
    note: null,
    wearers: [
      {
        name: 'Annika Roswald',
        bornOn: '1999-01-30',
        guardian: null,
        note: 'Skates pairs.',
        measurings: [
          {
            measuredOn: '2026-11-18',
            note: null,
            cm: {
              bustGirth: 86,
              underbustGirth: 73,
              waistGirth: 66,
              waistToHip: 20,
              highHipGirth: 84,
              hipGirth: 93,
              neckBaseGirth: 36,
              shoulderLength: 12,
              acrossBack: 33.5,
              backWaistLength: 40,
              frontWaistLength: 44,
              neckShoulderToBustPoint: 25.5,
              sideWaistLength: 21.5,
              bustPointDistance: 17.5,
              armscyeGirth: 37.5,
              stature: 164,
            },
          },
        ],
      },
    ],
  },
  {
    name: 'Beate Lindqvist-Oram',
    email: null,
    phone: '+00 000 0177',
    note: 'Mother of Maja; measurings at the house.',
    wearers: [
      {
        name: 'Maja Lindqvist-Oram',
        bornOn: '2014-05-06',
        guardian: 'Beate Lindqvist-Oram (mother), consent of 2026-11-03',
        note: 'Water sprite, children’s chorus.',
        measurings: [
          {
            measuredOn: '2026-11-03',
            note: null,
            cm: {
              bustGirth: 74,
              underbustGirth: 67,
              waistGirth: 61,
              acrossBack: 29.5,
              sideWaistLength: 19,
              waistToHip: 17,
              hipGirth: 78,
              neckBaseGirth: 32,
              shoulderLength: 10.5,
              backWaistLength: 34.5,
              frontWaistLength: 38,
              neckShoulderToBustPoint: 21.5,
              bustPointDistance: 15.5,
              armscyeGirth: 32,
              stature: 148,
            },
          },
        ],
      },
    ],
  },
  {
    name: 'Corvin Aldermoor',
    email: 'corvin@aldermoor.example',
    phone: null,
    note: 'Asked for a price, nothing measured yet.',
    wearers: [],
  },
]
