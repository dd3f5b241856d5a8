import { computed, shallowRef } from 'vue'
import { defineStore } from 'pinia'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import { usedTerms as termsInUse } from '@shared/mapping/used-terms'
import { getMapping, listMappings, listTerms } from '@/api/mappings'
import { getPolymer } from '@/api/polymers'
import { listStatePoints } from '@/api/state-points'
import { useSessionStore } from './session'

/** What every room of a mapping stands on: the polymer, its state points and mappings, and the terms at one state point. */
export const useWorkbenchStore = defineStore('workbench', () => {
  const session = useSessionStore()
  const polymer = shallowRef<Polymer | null>(null)
  const statePoints = shallowRef<readonly StatePoint[]>([])
  const mappings = shallowRef<readonly Mapping[]>([])
  const mapping = shallowRef<Mapping | null>(null)
  const statePoint = shallowRef<StatePoint | null>(null)
  const terms = shallowRef<readonly Term[]>([])

  /** The terms that the mapping does not leave out: what the rooms after the board work with. */
  const usedTerms = computed(() =>
    mapping.value === null ? terms.value : termsInUse(mapping.value.document, terms.value),
  )
  const canWrite = computed(() => session.canWrite(polymer.value?.groupId))

  /** Only the answer to the latest question counts: a slow earlier one must not overwrite it. */
  let asked = 0

  const clear = (): void => {
    asked += 1
    polymer.value = null
    statePoints.value = []
    mappings.value = []
    mapping.value = null
    statePoint.value = null
    terms.value = []
  }

  /** Loads a polymer with its state points and mappings; leaves any mapping. */
  const loadPolymer = async (polymerId: string): Promise<void> => {
    const question = ++asked
    const [loadedPolymer, loadedStatePoints, loadedMappings] = await Promise.all([
      getPolymer(polymerId),
      listStatePoints(polymerId),
      listMappings(polymerId),
    ])
    if (question !== asked) return
    polymer.value = loadedPolymer
    statePoints.value = loadedStatePoints
    mappings.value = loadedMappings
    mapping.value = null
    statePoint.value = null
    terms.value = []
  }

  /** Loads everything for the rooms of one mapping. Without a known state point the first one is taken. */
  const load = async (polymerId: string, mappingId: string, statePointId: string | null): Promise<void> => {
    const question = ++asked
    const [loadedPolymer, loadedStatePoints, loadedMappings, loadedMapping] = await Promise.all([
      getPolymer(polymerId),
      listStatePoints(polymerId),
      listMappings(polymerId),
      getMapping(mappingId),
    ])
    const chosen = loadedStatePoints.find(({ id }) => id === statePointId) ?? loadedStatePoints[0] ?? null
    const loadedTerms = await listTerms(mappingId, chosen?.id ?? null)
    if (question !== asked) return
    polymer.value = loadedPolymer
    statePoints.value = loadedStatePoints
    mappings.value = loadedMappings
    mapping.value = loadedMapping
    statePoint.value = chosen
    terms.value = loadedTerms
  }

  /** The terms again, after data or potentials changed. */
  const reloadTerms = async (): Promise<void> => {
    if (!mapping.value) return
    const question = asked
    const loadedTerms = await listTerms(mapping.value.id, statePoint.value?.id ?? null)
    if (question === asked) terms.value = loadedTerms
  }

  /** Moves to another state point of the same polymer. */
  const chooseStatePoint = async (statePointId: string): Promise<void> => {
    const chosen = statePoints.value.find(({ id }) => id === statePointId)
    if (!chosen || !mapping.value || chosen.id === statePoint.value?.id) return
    const question = ++asked
    const loadedTerms = await listTerms(mapping.value.id, chosen.id)
    if (question !== asked) return
    statePoint.value = chosen
    terms.value = loadedTerms
  }

  /** Takes over a mapping as it was just saved. */
  const replaceMapping = (saved: Mapping): void => {
    mappings.value = mappings.value.map((each) => (each.id === saved.id ? saved : each))
    if (mapping.value?.id === saved.id) mapping.value = saved
  }

  return {
    polymer,
    statePoints,
    mappings,
    mapping,
    statePoint,
    terms,
    usedTerms,
    canWrite,
    clear,
    loadPolymer,
    load,
    reloadTerms,
    chooseStatePoint,
    replaceMapping,
  }
})
