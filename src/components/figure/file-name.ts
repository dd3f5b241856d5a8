/** Part of a file name made of names people gave: letters, digits, dots and hyphens stay, the rest becomes a hyphen. */
export function fileNamePart(name: string): string {
  const plain = name.normalize('NFKD').replace(/[^A-Za-z0-9.]+/g, '-')
  return plain.replace(/^[-.]+|[-.]+$/g, '').slice(0, 60) || 'unnamed'
}

/** A file name, without its ending, of parts: poly-n-hexyl-acrylate_3-to-1_angle_B-E-H_400K. */
export function fileNameOf(...parts: readonly string[]): string {
  return parts.map(fileNamePart).join('_')
}
