import { expose } from 'comlink'
import { findAutomatic, runInversion, runRanking } from './inversion-task'

expose({ runInversion, runRanking, findAutomatic })
