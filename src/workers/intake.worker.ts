import { expose } from 'comlink'
import { forgetFile, readFile } from './intake-task'

expose({ readFile, forgetFile })
