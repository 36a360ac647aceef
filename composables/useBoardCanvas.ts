import type { Layer } from 'konva/lib/Layer'
import type { Stage } from 'konva/lib/Stage'
import { shallowRef } from 'vue'
import type { LevelId } from '#shared/domain/body/types'

/** What the board draws; left out means shown. Curve handles show on the chosen edge only. */
export interface BoardShow {
  readonly seam?: boolean
  readonly cutting?: boolean
  readonly levels?: boolean
  readonly ticks?: boolean
  readonly points?: boolean
  readonly labels?: boolean
  readonly bones?: boolean
}

export type BoardStrains = Readonly<Record<'front' | 'back', Readonly<Partial<Record<LevelId, number>>>>>

export type BoardLayer = 'paper' | 'pieces' | 'tools'
export type Draw = (pen: CanvasRenderingContext2D) => void

/**
 * The canvas of the board: three layers of raw nodes, none of which listens, each with one drawing. `redraw` names the layers that
 * changed; they are drawn once in the next frame.
 */
export function useBoardCanvas(draws: Readonly<Record<BoardLayer, Draw>>) {
  const stage = shallowRef<Stage | null>(null)
  const layers = new Map<BoardLayer, Layer>()

  async function open(container: HTMLDivElement, size: { readonly width: number; readonly height: number }) {
    const { Konva } = await import('konva/lib/Core')
    if (!container.isConnected) return
    const created = new Konva.Stage({ container, ...size, listening: false })
    for (const name of ['paper', 'pieces', 'tools'] as const) {
      const layer = new Konva.Layer({ listening: false })
      layer.add(
        new Konva.Shape({
          listening: false,
          perfectDrawEnabled: false,
          sceneFunc: (context) => draws[name](context._context as CanvasRenderingContext2D),
        }),
      )
      layers.set(name, layer)
      created.add(layer)
    }
    stage.value = created
  }

  const redraw = (...names: BoardLayer[]) => names.forEach((name) => layers.get(name)?.batchDraw())
  const resize = (size: { readonly width: number; readonly height: number }) => {
    stage.value?.size(size)
    redraw('paper', 'pieces', 'tools')
  }
  function close() {
    stage.value?.destroy()
    stage.value = null
    layers.clear()
  }
  return { stage, open, redraw, resize, close }
}
