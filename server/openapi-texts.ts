import { KEY_MARK } from '../shared/contracts/key'

/** What stands at the head of the API document. Markdown. */
export const API_DESCRIPTION = `From a drawn repeat unit to tables of bonded potentials, over the same routes that the pages use.

**Units.** Numbers are in internal units: nm, rad, kJ/mol, K, bar, g/mol; mutual information in nats. \`null\` stands for "no data".
Files come and go in the units that are asked for by name.

**Scripts** send a key: \`Authorization: Bearer ${KEY_MARK}…\`. People make keys on their account page; a key is shown once, may do
what its scopes name (\`read\`, \`write\`, \`hand-overs\`), never more than its person, and needs no token. \`GET /api/key\` says for whom
it acts and in which groups. Managing groups, people, sessions and keys, and signing off, is not open to keys.

**Browsers** sign in with \`POST /api/session\` and keep the cookie. Every write carries the header \`X-CSRF-Token\` with the token
that \`GET /api/session\` gives; signing in changes it. With a key the cookie counts for nothing.

**Errors** have one shape: a \`code\` that stays, a \`message\` for people, the \`field\` it is about, and the \`requestId\` that stands in
the log. Whoever is not in the group of a record gets 404 for it, just as if it were not there. 409 \`CONFLICT\` holds the current
record in \`details\`: send its \`revision\` with the change. 422 is content that the core refuses, with line and column.
429 \`TOO_MANY_ATTEMPTS\` says in \`Retry-After\` how many seconds to wait.

**Files** go up as \`multipart/form-data\`: the file in \`file\`, the rest as JSON in the field \`settings\`; 20 MB a file, 64 MB a request.`

/** Resources in the order of a job, with what they are. */
export const TAGS: readonly { readonly name: string; readonly description: string }[] = [
  { name: 'key', description: 'The key a script came with' },
  { name: 'groups', description: 'Groups with their people and polymers' },
  { name: 'polymers', description: 'Repeat units, their state points and mappings' },
  { name: 'state-points', description: 'Temperature, pressure, phase and composition' },
  { name: 'mappings', description: 'Which atoms become which bead, and the terms that follow' },
  { name: 'terms', description: 'Bonds, angles and dihedrals: their data, potentials and tables' },
  { name: 'distributions', description: 'Histograms as they came' },
  { name: 'potentials', description: 'Saved inversions' },
  { name: 'joint-distributions', description: 'Two terms measured together' },
  { name: 'hand-overs', description: 'Numbered sets of tables: checklist, review, release, files' },
  { name: 'session', description: 'Signing in and out' },
  { name: 'account', description: 'One’s own name, password and current group' },
  { name: 'keys', description: 'One’s own API keys' },
  { name: 'invitations', description: 'Invitations into a group' },
  { name: 'join', description: 'Taking up an invitation' },
  { name: 'password-resets', description: 'A new password by e-mail' },
  { name: 'set-up', description: 'The first group and its owner' },
  { name: 'health', description: 'Whether the server can do its work' },
]
