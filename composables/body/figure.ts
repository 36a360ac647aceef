import type { MeasurementKey } from '#shared/domain/body/types'

/**
 * A plain figure of our own and where each measurement's tape lies on it. Centimetres on a figure 168 cm tall; y runs down from the
 * top of the head, x to the right of the centre line (in the side view: forward). It teaches where to measure; it is nobody's body.
 */
export type FigureView = 'front' | 'back' | 'side'
type XY = readonly [number, number]

export interface Tape {
  readonly view: FigureView
  /** Lines on the near side of the body, and those that run round behind it. */
  readonly near: readonly string[]
  readonly far: readonly string[]
  readonly landmarks: readonly { readonly at: XY; readonly name: string }[]
  /** A neighbouring level drawn faintly, so that the two are not mistaken for each other. */
  readonly other?: { readonly path: string; readonly at: XY; readonly name: string }
  /** Straight between the arms of a calliper or along a wall, not round the body. */
  readonly straight?: boolean
  readonly whole?: boolean
}

const fixed = (value: number) => Number(value.toFixed(2))

/** A smooth line through points (Catmull-Rom as cubics). */
export function smoothLine(points: readonly XY[], moveFirst = true): string {
  const at = (index: number): XY => points[Math.max(0, Math.min(points.length - 1, index))]!
  let path = moveFirst ? `M${at(0)[0]} ${at(0)[1]}` : ''
  for (let i = 0; i < points.length - 1; i++) {
    const [before, from, to, after] = [at(i - 1), at(i), at(i + 1), at(i + 2)]
    const c1 = [from[0] + (to[0] - before[0]) / 6, from[1] + (to[1] - before[1]) / 6]
    const c2 = [to[0] - (after[0] - from[0]) / 6, to[1] - (after[1] - from[1]) / 6]
    path += `C${fixed(c1[0]!)} ${fixed(c1[1]!)} ${fixed(c2[0]!)} ${fixed(c2[1]!)} ${to[0]} ${to[1]}`
  }
  return path
}

const mirrored = (points: readonly XY[]): XY[] => points.map(([x, y]): XY => [-x, y])

const neck: XY[] = [
  [4.9, 21.5],
  [4.8, 24.6],
  [6.4, 27.4],
  [11.5, 29.6],
  [16.4, 31],
]
const arm: XY[] = [
  [16.4, 31],
  [19.6, 33.6],
  [21.2, 40],
  [22.4, 50],
  [24.6, 63],
  [27.6, 77],
  [29.2, 86],
  [31, 94],
  [30.2, 101.5],
  [28, 100],
  [26.6, 93],
  [25.8, 86],
  [23, 76],
  [20.4, 64],
  [18.2, 52],
  [15.6, 41.5],
]
const flank: XY[] = [
  [15.6, 41.5],
  [15.1, 47],
  [13.5, 54],
  [12.2, 62.5],
  [13.9, 69],
  [16, 74],
  [17.9, 84],
  [17.3, 96],
  [13.6, 112],
  [11.6, 122],
  [12, 133],
  [8.8, 150],
  [7.4, 160],
  [9.4, 166.5],
]
const innerLeg: XY[] = [
  [3.4, 166.5],
  [3.6, 159],
  [3.2, 140],
  [3.4, 122],
  [1.6, 104],
  [0.7, 92],
]

const sideFront: XY[] = [
  [4.4, 22],
  [4.6, 27],
  [6, 31.4],
  [8.6, 38],
  [12.2, 46.4],
  [10, 53],
  [8.8, 62.5],
  [10, 69.5],
  [9.8, 77],
  [8.6, 86],
  [8.2, 96],
  [6, 120],
  [4.4, 140],
  [3.2, 158],
  [11, 166.5],
]
const sideBack: XY[] = [
  [-5.6, 19.5],
  [-4.9, 25.4],
  [-8.4, 33],
  [-10, 42],
  [-8.8, 52],
  [-6.4, 62.5],
  [-8, 70],
  [-11.8, 82],
  [-9.4, 92],
  [-8, 104],
  [-4.8, 122],
  [-6.8, 134],
  [-3.6, 156],
  [-5.4, 166.5],
]

const halfFront = (flip: boolean) => {
  const turn = (points: XY[]) => (flip ? mirrored(points) : points)
  return [smoothLine(turn(neck)), smoothLine(turn(arm)), smoothLine(turn(flank)), smoothLine(turn(innerLeg))]
}
/** Filled shapes under the lines, so that the figure is a body and not a wire. */
const frontFill = `${smoothLine([...neck, ...arm.slice(0, 2)])}L15.6 41.5${smoothLine(flank, false)}L3.4 166.5${smoothLine(innerLeg, false)}L-.7 92${smoothLine(
  mirrored([...innerLeg].reverse()),
  false,
)}L-9.4 166.5${smoothLine(mirrored([...flank].reverse()), false)}L-19.6 33.6${smoothLine(mirrored([...neck, ...arm.slice(0, 2)].reverse()), false)}Z`
const armFill = `${smoothLine(arm)}Z`
const leftArmFill = `${smoothLine(mirrored(arm))}Z`
const sideFill = `${smoothLine(sideFront)}L-5.4 166.5${smoothLine([...sideBack].reverse(), false)}Z`

export const figureShapes: Record<
  FigureView,
  { readonly fills: readonly string[]; readonly lines: readonly string[]; readonly head: XY; readonly headRadii: XY }
> = {
  front: {
    fills: [armFill, leftArmFill, frontFill],
    lines: [
      ...halfFront(false),
      ...halfFront(true),
      smoothLine([
        [3.4, 51.6],
        [8.6, 53.4],
        [13.4, 50],
      ]),
      smoothLine([
        [-3.4, 51.6],
        [-8.6, 53.4],
        [-13.4, 50],
      ]),
    ],
    head: [0, 11.8],
    headRadii: [7.3, 11.4],
  },
  back: {
    fills: [armFill, leftArmFill, frontFill],
    lines: [
      ...halfFront(false),
      ...halfFront(true),
      'M0 28V88',
      smoothLine([
        [6.4, 38],
        [8.6, 42.5],
        [7.6, 47],
      ]),
      smoothLine([
        [-6.4, 38],
        [-8.6, 42.5],
        [-7.6, 47],
      ]),
    ],
    head: [0, 11.8],
    headRadii: [7.3, 11.4],
  },
  side: { fills: [sideFill], lines: [smoothLine(sideFront), smoothLine(sideBack)], head: [0.4, 11.8], headRadii: [8.8, 11.4] },
}

const round = (y: number, half: number, centre = 0, dip = 1.9): Pick<Tape, 'near' | 'far'> => ({
  near: [`M${centre - half} ${y}C${centre - half * 0.55} ${y + dip} ${centre + half * 0.55} ${y + dip} ${centre + half} ${y}`],
  far: [`M${centre - half} ${y}C${centre - half * 0.55} ${y - dip} ${centre + half * 0.55} ${y - dip} ${centre + half} ${y}`],
})
const along = (...points: XY[]): Pick<Tape, 'near' | 'far'> => ({ near: [smoothLine(points)], far: [] })

const bustPoint: XY = [8.6, 47.6]
const neckShoulder: XY = [6.4, 27.4]
const shoulderEnd: XY = [17.6, 31.7]
const nape: XY = [0, 26]
const mark = (name: string, at: XY) => ({ at, name })

/** Where each measurement is taken; stature of the person, mass and age have no tape. */
export const tapes: Partial<Record<MeasurementKey, Tape>> = {
  bustGirth: { view: 'front', ...round(47.6, 15.1), landmarks: [mark('bust point', bustPoint)] },
  underbustGirth: { view: 'front', ...round(54, 13.5), landmarks: [mark('straight under the bust', [0, 55.4])] },
  waistGirth: {
    view: 'front',
    ...round(62.5, 12.2),
    landmarks: [mark('natural waist, where the body bends to the side', [12.2, 62.5])],
    other: { path: 'M-13.9 69H13.9', at: [0, 69], name: 'navel, lower: not here' },
  },
  navelWaistGirth: {
    view: 'front',
    ...round(69, 13.9),
    landmarks: [mark('navel', [0, 70.4])],
    other: { path: 'M-12.2 62.5H12.2', at: [0, 62.5], name: 'natural waist, higher: not here' },
  },
  highHipGirth: { view: 'front', ...round(73.4, 15.8), landmarks: [mark('half-way from natural waist to hip', [15.8, 73.4])] },
  hipGirth: { view: 'front', ...round(84, 17.9), landmarks: [mark('fullest part of the seat', [17.9, 84])] },
  upperBustGirth: { view: 'front', ...round(41.8, 15.5), landmarks: [mark('close under the arms, above the bust', [15.4, 41.8])] },
  neckBaseGirth: {
    view: 'front',
    near: ['M-6.4 27.4C-4.4 32.4 4.4 32.4 6.4 27.4'],
    far: ['M-6.4 27.4C-3 25.2 3 25.2 6.4 27.4'],
    landmarks: [mark('front neck point', [0, 31.1]), mark('neck-shoulder point', neckShoulder)],
  },
  shoulderLength: {
    view: 'front',
    ...along(neckShoulder, [12, 29.8], shoulderEnd),
    landmarks: [mark('neck-shoulder point', neckShoulder), mark('shoulder end', shoulderEnd)],
  },
  shoulderSlope: {
    view: 'front',
    near: [`M6.4 27.4L17.6 31.7`],
    far: ['M6.4 27.4H19'],
    landmarks: [mark('neck-shoulder point', neckShoulder), mark('shoulder end, below the level line', shoulderEnd)],
    straight: true,
  },
  acrossBack: {
    view: 'back',
    ...along([-15.8, 38], [0, 38.6], [15.8, 38]),
    landmarks: [mark('back of the arm, half-way down the armhole', [15.8, 38])],
  },
  acrossFront: {
    view: 'front',
    ...along([-14.8, 38.4], [0, 39], [14.8, 38.4]),
    landmarks: [mark('front of the arm, half-way down the armhole', [14.8, 38.4])],
  },
  backWaistLength: {
    view: 'back',
    ...along(nape, [0, 44], [0, 62.5]),
    landmarks: [mark('nape, the bone that stands out', nape), mark('natural waist', [0, 62.5])],
  },
  frontWaistLength: {
    view: 'front',
    ...along(neckShoulder, [8.2, 38], bustPoint, [8, 54.5], [7.6, 62.8]),
    landmarks: [mark('neck-shoulder point', neckShoulder), mark('bust point', bustPoint), mark('natural waist', [7.6, 62.8])],
  },
  neckShoulderToBustPoint: {
    view: 'front',
    ...along(neckShoulder, [8.2, 38], bustPoint),
    landmarks: [mark('neck-shoulder point', neckShoulder), mark('bust point', bustPoint)],
  },
  sideWaistLength: {
    view: 'side',
    ...along([0, 42], [0.4, 52], [0.8, 62.5]),
    landmarks: [mark('underarm', [0, 42]), mark('natural waist', [0.8, 62.5])],
  },
  waistToHip: {
    view: 'side',
    ...along([0.8, 62.5], [-0.2, 73], [-0.8, 84]),
    landmarks: [mark('natural waist', [0.8, 62.5]), mark('hip level', [-0.8, 84])],
  },
  bustPointDistance: {
    view: 'front',
    ...along([-8.6, 47.6], [8.6, 47.6]),
    landmarks: [mark('bust point', [-8.6, 47.6]), mark('bust point', bustPoint)],
    straight: true,
  },
  bustPointToUnderbust: {
    view: 'front',
    ...along(bustPoint, [8.4, 51], [7.6, 54.4]),
    landmarks: [mark('bust point', bustPoint), mark('underbust', [7.6, 54.4])],
  },
  frontBustArc: {
    view: 'front',
    near: round(47.6, 15.1).near,
    far: [],
    landmarks: [mark('side line', [-15.1, 47.6]), mark('side line', [15.1, 47.6])],
  },
  armscyeGirth: {
    view: 'side',
    near: ['M0 30.6C5.4 31.6 6 41.4 0.4 43.4C-5.6 41.8-5 31.6 0 30.6'],
    far: [],
    landmarks: [mark('over the shoulder end', [0, 30.6]), mark('under the arm', [0.4, 43.4])],
  },
  trunkGirth: {
    view: 'front',
    near: [
      smoothLine([
        [11.5, 29.6],
        [9.4, 47.6],
        [6.4, 66],
        [2.4, 84],
        [0, 92.4],
      ]),
    ],
    far: ['M11.5 29.6C14 44 12 74 0 92.4'],
    landmarks: [mark('middle of the shoulder', [11.5, 29.6]), mark('between the legs and up the back', [0, 92.4])],
  },
  shoulderGirth: { view: 'front', ...round(38, 20.8), landmarks: [mark('round shoulders and both arms', [20.8, 38])] },
  headGirth: { view: 'front', ...round(8, 7.1, 0, 1.4), landmarks: [mark('brow, and the fullest part behind', [0, 9])] },
  handGirth: { view: 'front', ...round(94, 2.4, 28.7, 0.8), landmarks: [mark('over the knuckles, thumb laid in', [31, 94])] },
  thighGirth: { view: 'front', ...round(96, 8.1, 9.2, 1.2), landmarks: [mark('just under the seat', [17.3, 96])] },
  upperArmGirth: { view: 'front', ...round(48, 2.5, 19.8, 0.8), landmarks: [mark('fullest part of the upper arm', [22.2, 48])] },
  elbowGirth: { view: 'front', ...round(63, 2.2, 22.4, 0.8), landmarks: [mark('over the bent elbow', [24.6, 63])] },
  wristGirth: { view: 'front', ...round(85.6, 1.8, 27.4, 0.6), landmarks: [mark('wrist bone', [29.2, 85.6])] },
  armLength: {
    view: 'back',
    ...along(shoulderEnd, [21.4, 44], [24.2, 62], [28.6, 85.6]),
    landmarks: [mark('shoulder end', shoulderEnd), mark('elbow, arm a little bent', [24.2, 62]), mark('wrist bone', [28.6, 85.6])],
  },
  bustBreadth: {
    view: 'front',
    ...along([-15.1, 47.6], [15.1, 47.6]),
    landmarks: [mark('side to side at the bust', [15.1, 47.6])],
    straight: true,
  },
  bustDepth: {
    view: 'side',
    ...along([-9.6, 46.8], [12.2, 46.8]),
    landmarks: [mark('front to back at the bust', [12.2, 46.8])],
    straight: true,
  },
  waistBreadth: {
    view: 'front',
    ...along([-12.2, 62.5], [12.2, 62.5]),
    landmarks: [mark('side to side at the natural waist', [12.2, 62.5])],
    straight: true,
  },
  waistDepth: {
    view: 'side',
    ...along([-6.4, 62.5], [8.8, 62.5]),
    landmarks: [mark('front to back at the natural waist', [8.8, 62.5])],
    straight: true,
  },
  hipBreadth: {
    view: 'front',
    ...along([-17.9, 84], [17.9, 84]),
    landmarks: [mark('side to side at the hip', [17.9, 84])],
    straight: true,
  },
  hipDepth: { view: 'side', ...along([-11.8, 83], [8.9, 83]), landmarks: [mark('front to back at the hip', [8.9, 83])], straight: true },
  stature: {
    view: 'front',
    near: ['M-34 .4V166.5'],
    far: ['M-34 .4H0', 'M-34 166.5H-9'],
    landmarks: [mark('top of the head', [0, 0.4])],
    straight: true,
    whole: true,
  },
}
