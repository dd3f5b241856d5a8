import { computed, type ComputedRef } from 'vue'
import type { JointDistribution } from '@shared/contracts/distribution'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import type { Correlation } from '@shared/correlation'
import { mapCsv } from '@/components/correlation/figure/map-csv'
import type { MapModel } from '@/components/correlation/figure/map-model'
import { mapPicture } from '@/components/correlation/figure/map-picture'
import type { MapView } from '@/components/correlation/figure/map-view'
import type { PairNames } from '@/components/correlation/verdict-words'
import type { FigureCaption } from '@/components/figure/figure-caption'
import { fileNameOf } from '@/components/figure/file-name'
import { fixedText } from '@/components/figure/number-text'
import { statePointDescription } from '@/format/state-point'
import type { FigureFiles } from './useFigureExport'

/** What the files of the map are made from. */
export interface CorrelationExportSource {
  readonly polymer: () => Polymer | null
  readonly mapping: () => Mapping | null
  readonly statePoint: () => StatePoint | null
  readonly joint: () => JointDistribution | null
  readonly correlation: () => Correlation | null
  readonly model: () => MapModel | null
  readonly names: () => PairNames
  readonly view: () => MapView
}

/** The correlation map as files; null while there is nothing to draw. */
export function useCorrelationExport(source: CorrelationExportSource): ComputedRef<FigureFiles | null> {
  return computed(() => {
    const [polymer, mapping, statePoint] = [source.polymer(), source.mapping(), source.statePoint()]
    const [joint, correlation, model] = [source.joint(), source.correlation(), source.model()]
    if (polymer === null || mapping === null || statePoint === null) return null
    if (joint === null || correlation === null || model === null) return null
    const [names, view] = [source.names(), source.view()]
    const caption: FigureCaption = {
      polymer: polymer.name,
      mapping: mapping.name,
      terms: `${correlation.kinds[0]} ${names[0]} with ${correlation.kinds[1]} ${names[1]}`,
      statePoint: statePointDescription(statePoint),
      remarks: [sampleRemark(correlation)],
      invented: polymer.demo,
    }
    return {
      name: () =>
        fileNameOf(polymer.name, mapping.name, names[0], names[1], `${statePoint.temperature}K`, view),
      picture: () => mapPicture(correlation, model, view, names, caption),
      csv: () => mapCsv(correlation, model, joint.weights, names, caption),
    }
  })
}

function sampleRemark({ samples, content, independentSamples }: Correlation): string {
  const independent =
    independentSamples === null
      ? 'number of independent samples not stated'
      : `${fixedText(independentSamples)} independent samples`
  return samples === null
    ? `From a ${content}, ${independent}`
    : `${fixedText(samples)} counts, ${independent}`
}
