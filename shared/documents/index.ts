export { importMappingFile, type MappingImport } from './import-mapping-file'
export type { MappingFileError, MappingFileErrorCode } from './mapping-file-error'
export { MAPPING_FILE_FORMAT, MAPPING_FILE_VERSION, type MappingFile } from './mapping-file-schema'
export { type MappingFileReading, readMappingFile } from './read-mapping-file'
export { writeMappingFile } from './write-mapping-file'
export {
  LAYOUT_FILE_FORMAT,
  LAYOUT_FILE_VERSION,
  type LayoutFileError,
  type LayoutFileErrorCode,
  type LayoutFileReading,
  readLayoutFile,
  writeLayoutFile,
} from './layout-file'
