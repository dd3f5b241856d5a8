import type { Founding } from '../services/group.service'

/** The invented group. Its addresses lie in a reserved domain; nobody in it has a password. */
export const DEMO_FOUNDING: Founding = {
  name: 'Adhesives (demonstration)',
  demo: true,
  people: [
    { name: 'Oda Lindqvist', email: 'owner.demo@example.org', role: 'owner', password: null },
    { name: 'Milo Ferrante', email: 'modeller.demo@example.org', role: 'modeller', password: null },
    { name: 'Renate Okafor', email: 'reviewer.demo@example.org', role: 'reviewer', password: null },
    { name: 'Colin Abebe', email: 'collaborator.demo@example.org', role: 'collaborator', password: null },
  ],
}
