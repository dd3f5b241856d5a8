import { expose } from 'comlink'
import { findAutomatic, runInversion } from './inversion-task'

expose({ runInversion, findAutomatic })
