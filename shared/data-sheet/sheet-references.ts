/** Published methods that a sheet may name. */
const WORKS = {
  tschoep: 'W. Tschöp, K. Kremer, J. Batoulis, T. Bürger, O. Hahn, Acta Polym. 49 (1998) 61.',
  reith: 'D. Reith, M. Pütz, F. Müller-Plathe, J. Comput. Chem. 24 (2003) 1624.',
  eilersMarx: 'P. H. C. Eilers, B. D. Marx, Stat. Sci. 11 (1996) 89.',
  eilers: 'P. H. C. Eilers, Anal. Chem. 75 (2003) 3631.',
  woodFasiolo: 'S. N. Wood, M. Fasiolo, Biometrics 73 (2017) 1071.',
  akaike: 'H. Akaike, IEEE Trans. Autom. Control 19 (1974) 716.',
  thompsonBaker: 'R. Thompson, R. J. Baker, Appl. Stat. 30 (1981) 125.',
  eilersComposite: 'P. H. C. Eilers, Stat. Model. 7 (2007) 239.',
  flyvbjerg: 'H. Flyvbjerg, H. G. Petersen, J. Chem. Phys. 91 (1989) 461.',
  edelsbrunner: 'H. Edelsbrunner, D. Letscher, A. Zomorodian, Discrete Comput. Geom. 28 (2002) 511.',
  ryckaert: 'J.-P. Ryckaert, A. Bellemans, Chem. Phys. Lett. 30 (1975) 123.',
  milano: 'G. Milano, S. Goudeau, F. Müller-Plathe, J. Polym. Sci. B 43 (2005) 871.',
  prohaska: 'T. Prohaska et al., Pure Appl. Chem. 94 (2022) 573.',
} as const
export type Work = keyof typeof WORKS

/** Numbers works in the order in which they are first named. */
export class References {
  private readonly named: Work[] = []

  /** The marks of works in a sentence. @example cite('tschoep', 'reith') // '[1, 2]' */
  cite(...works: readonly Work[]): string {
    const numbers = works.map((work) => {
      if (!this.named.includes(work)) this.named.push(work)
      return this.named.indexOf(work) + 1
    })
    return `[${numbers.join(', ')}]`
  }

  /** The list at the end, in the order of the numbers. */
  list(): string[] {
    return this.named.map((work) => WORKS[work])
  }
}
