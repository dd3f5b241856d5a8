import { computed, type ComputedRef } from 'vue'
import type { Distribution } from '@shared/contracts/distribution'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import { benchCsv } from '@/components/bench/figure/bench-csv'
import type { BasinSign } from '@/components/bench/figure/basin-signs'
import { benchPicture } from '@/components/bench/figure/bench-picture'
import type { FigureModel } from '@/components/bench/figure/figure-model'
import type { VisibleCurves } from '@/components/bench/figure/visible-curves'
import type { FigureCaption } from '@/components/figure/figure-caption'
import { fileNameOf } from '@/components/figure/file-name'
import { fixedText } from '@/components/figure/number-text'
import { statePointDescription } from '@/format/state-point'
import type { InversionAnswer } from '@/workers'
import type { FigureFiles } from './useFigureExport'

/** What the files of the bench figure are made from. */
export interface BenchExportSource {
  readonly polymer: () => Polymer | null
  readonly mapping: () => Mapping
  readonly term: () => Term
  readonly statePoint: () => StatePoint
  readonly distribution: () => Distribution | null
  readonly model: () => FigureModel | null
  readonly basins: () => readonly BasinSign[]
  readonly answer: () => InversionAnswer | null
  readonly visible: VisibleCurves
}

/** The bench figure as files, made from what it shows when they are asked for; null while there is nothing to draw. */
export function useBenchExport(source: BenchExportSource): ComputedRef<FigureFiles | null> {
  const drawn = (): Drawn | null => {
    const [polymer, distribution, model, answer] = [
      source.polymer(),
      source.distribution(),
      source.model(),
      source.answer(),
    ]
    if (polymer === null || distribution === null || model === null || answer === null) return null
    const { jacobian, independentSamples } = answer.inversion
    const caption: FigureCaption = {
      polymer: polymer.name,
      mapping: source.mapping().name,
      terms: `${source.term().kind} ${source.term().name}`,
      statePoint: statePointDescription(source.statePoint()),
      remarks: [sampleRemark(distribution, independentSamples)],
      invented: polymer.demo,
    }
    return { polymer, distribution, model, jacobian, caption }
  }
  const there = (): Drawn => {
    const found = drawn()
    if (found === null) throw new Error('There is no figure to export.')
    return found
  }
  const files: FigureFiles = {
    name: () => {
      const [mapping, term, statePoint] = [source.mapping(), source.term(), source.statePoint()]
      return fileNameOf(
        there().polymer.name,
        mapping.name,
        term.kind,
        term.name,
        `${statePoint.temperature}K`,
      )
    },
    picture: () => {
      const { model, jacobian, caption } = there()
      return benchPicture(model, source.basins(), source.visible, jacobian, caption)
    },
    csv: () => {
      const { model, distribution, jacobian, caption } = there()
      return benchCsv(model, distribution.content, jacobian, caption)
    },
  }
  return computed(() => (drawn() === null ? null : files))
}

interface Drawn {
  readonly polymer: Polymer
  readonly distribution: Distribution
  readonly model: FigureModel
  readonly jacobian: boolean
  readonly caption: FigureCaption
}

function sampleRemark({ content, weights }: Distribution, independentSamples: number | null): string {
  const independent =
    independentSamples === null
      ? 'number of independent samples not stated'
      : `${fixedText(independentSamples)} independent samples`
  if (content !== 'count') return `From a ${content}, ${independent}`
  return `${fixedText(weights.reduce((total, weight) => total + weight, 0))} counts, ${independent}`
}
