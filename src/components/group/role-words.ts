import type { Role } from '@shared/contracts/common'

/** The roles with what each may do, for a choice among them. */
export const ROLE_CHOICES: readonly {
  readonly value: Role
  readonly title: string
  readonly subtitle: string
}[] = [
  { value: 'owner', title: 'owner', subtitle: 'runs the group, writes and reviews' },
  { value: 'modeller', title: 'modeller', subtitle: 'makes mappings, potentials and tables' },
  { value: 'reviewer', title: 'reviewer', subtitle: 'sees all, signs off or sends back' },
  { value: 'collaborator', title: 'collaborator', subtitle: 'sees what is handed over' },
]
