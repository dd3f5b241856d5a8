import { expose } from 'comlink'
import { runCorrelation } from './correlation-task'

expose({ runCorrelation })
