export { csvCell, plainWords } from './csv-cell'
export { csvText, type CsvColumn } from './csv-text'
