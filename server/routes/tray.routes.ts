import { traySchema } from '../../shared/contracts/tray'
import { route } from './route'

export const trayRoutes = [
  route({
    method: 'get',
    path: '/api/tray',
    summary: 'Mails that stayed on this machine, where no mail server is set',
    access: 'anyone',
    answer: { status: 200, body: traySchema },
    errors: ['NOT_FOUND'],
    handle: async ({ services }) => ({ mails: await services.tray.list() }),
  }),
]
