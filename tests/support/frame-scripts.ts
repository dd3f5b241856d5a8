import type { CDPSession } from 'playwright-core'

/** An event of Chromium's trace, as far as it is read here; times in µs. */
interface TraceEvent {
  readonly name: string
  readonly ph: string
  readonly pid: number
  readonly tid: number
  readonly ts: number
  readonly dur?: number
  /** Processor time of the thread: other programs on the machine do not count. */
  readonly tdur?: number
  readonly args?: { readonly name?: string; readonly data?: { readonly type?: string } }
}

/** What one frame of the page's main thread took, ms of processor time. */
export interface FrameScript {
  /** Everything that script ran, with the layout and style it forced and the garbage it left. */
  readonly script: number
  /** Style and layout outside script, and painting. */
  readonly drawing: number
}

const CATEGORIES = ['__metadata', 'devtools.timeline', 'disabled-by-default-devtools.timeline.frame']
/** A frame begins here; input and animation callbacks run inside it, timers and promises before the next. */
const FRAME = 'BeginMainThreadFrame'
const SCRIPT =
  /^(EventDispatch|FunctionCall|FireAnimationFrame|FireIdleCallback|TimerFire|RunMicrotasks|EvaluateScript|MinorGC|MajorGC|V8\.GC.*)$/
const DRAWING = /^(UpdateLayoutTree|Layout|PrePaint|Paint|Layerize|Commit|HitTest)$/

/**
 * Records what a page does while something is done to it, and adds up the processor time of script in each frame.
 *
 * @returns the frames of the page's main thread in their order, those without script included
 */
export async function frameScripts(session: CDPSession, act: () => Promise<void>): Promise<FrameScript[]> {
  const events: TraceEvent[] = []
  session.on('Tracing.dataCollected', ({ value }) => events.push(...(value as unknown as TraceEvent[])))
  const complete = new Promise((resolve) => session.once('Tracing.tracingComplete', resolve))
  await session.send('Tracing.start', {
    transferMode: 'ReportEvents',
    traceConfig: { includedCategories: CATEGORIES },
  })
  await act()
  await session.send('Tracing.end')
  await complete
  return frames(events)
}

function frames(events: readonly TraceEvent[]): FrameScript[] {
  const mains = events.filter(({ name, args }) => name === 'thread_name' && args?.name === 'CrRendererMain')
  const count = (thread: TraceEvent): number =>
    events.filter(({ name, pid, tid }) => name === FRAME && pid === thread.pid && tid === thread.tid).length
  // The browser keeps spare renderers: the page is in the one that draws.
  const main = mains.toSorted((one, other) => count(other) - count(one)).at(0)
  if (main === undefined) throw new Error('The trace has no main thread.')
  const own = events
    .filter(({ pid, tid }) => pid === main.pid && tid === main.tid)
    .toSorted((one, other) => one.ts - other.ts || (other.dur ?? 0) - (one.dur ?? 0))
  const starts = own.filter(({ name }) => name === FRAME).map(({ ts }) => ts)
  const script = outermost(own.filter(({ name, dur }) => SCRIPT.test(name) && dur !== undefined))
  const drawing = outermost(own.filter(({ name, dur }) => DRAWING.test(name) && dur !== undefined)).filter(
    ({ ts }) => !script.some((each) => each.ts <= ts && ts < each.ts + (each.dur ?? 0)),
  )
  return starts.map((start, frame) => {
    const end = starts[frame + 1] ?? Infinity
    const within = (list: readonly TraceEvent[]): number =>
      list
        .filter(({ ts }) => ts >= start && ts < end)
        .reduce((sum, { tdur, dur }) => sum + (tdur ?? dur ?? 0) / 1000, 0)
    return { script: within(script), drawing: within(drawing) }
  })
}

/** Events that lie in no other of the list; sorted by their start. */
function outermost(sorted: readonly TraceEvent[]): TraceEvent[] {
  let end = -Infinity
  return sorted.filter(({ ts, dur }) => {
    if (ts < end) return false
    end = ts + (dur ?? 0)
    return true
  })
}
