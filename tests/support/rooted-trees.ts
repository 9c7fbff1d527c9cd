/**
 * Order conditions of Runge-Kutta and Rosenbrock methods, generated from rooted trees
 * [HairerNorsettWanner1993, II.2; HairerWanner1996, IV.7].
 */

/** A rooted tree: the subtrees of its root. */
export interface Tree {
  readonly children: readonly Tree[];
}

/** Number of vertices. */
export function treeOrder(tree: Tree): number {
  return tree.children.reduce((sum, child) => sum + treeOrder(child), 1);
}

/** gamma(t): the order times the densities of the subtrees; 1/gamma(t) is what the weights must give. */
export function density(tree: Tree): number {
  return tree.children.reduce((product, child) => product * density(child), treeOrder(tree));
}

const key = (tree: Tree): string => `[${tree.children.map(key).sort().join('')}]`;

/** All rooted trees with the given number of vertices: 1, 1, 2, 4, 9, 20 for 1 to 6. */
export function rootedTrees(order: number): Tree[] {
  const found = new Map<string, Tree>();
  if (order === 1) return [{ children: [] }];
  for (const smaller of rootedTrees(order - 1)) {
    for (const grown of withLeaf(smaller)) found.set(key(grown), grown);
  }
  return [...found.values()];
}

/** The trees that arise by hanging one more leaf on any vertex. */
function withLeaf(tree: Tree): Tree[] {
  const here: Tree = { children: [...tree.children, { children: [] }] };
  const below = tree.children.flatMap((child, at) =>
    withLeaf(child).map((grown) => ({ children: tree.children.map((c, k) => (k === at ? grown : c)) })),
  );
  return [here, ...below];
}

type Matrix = readonly (readonly number[])[];

const times = (matrix: Matrix, v: readonly number[]): number[] =>
  matrix.map((row) => row.reduce((sum, x, j) => sum + x * (v[j] ?? 0), 0));

/**
 * Phi_i(t) of each stage: the product over the subtrees of matrix*Phi. `single` is the matrix used below a vertex with
 * one child (alpha + gamma for Rosenbrock methods), `multiple` below one with several (alpha).
 */
export function elementaryWeights(tree: Tree, single: Matrix, multiple: Matrix): number[] {
  const matrix = tree.children.length === 1 ? single : multiple;
  return tree.children
    .map((child) => times(matrix, elementaryWeights(child, single, multiple)))
    .reduce(
      (product, factor) => product.map((x, i) => x * factor[i]!),
      multiple.map(() => 1),
    );
}

/**
 * What every choice of matrix must satisfy in a W-method: each vertex with one child may be reached through alpha (a true
 * derivative) or through gamma (the matrix in use); every condition with a gamma in it must vanish.
 */
export function splitWeights(tree: Tree, alpha: Matrix, gamma: Matrix): { phi: number[]; withGamma: boolean }[] {
  if (tree.children.length === 0) return [{ phi: alpha.map(() => 1), withGamma: false }];
  const options = tree.children.map((child) => {
    const below = splitWeights(child, alpha, gamma);
    const through = below.map(({ phi, withGamma }) => ({ phi: times(alpha, phi), withGamma }));
    if (tree.children.length > 1) return through;
    return [...through, ...below.map(({ phi }) => ({ phi: times(gamma, phi), withGamma: true }))];
  });
  return options.reduce(
    (products, factors) =>
      products.flatMap((p) =>
        factors.map((f) => ({
          phi: p.phi.map((x, i) => x * f.phi[i]!),
          withGamma: p.withGamma || f.withGamma,
        })),
      ),
    [{ phi: alpha.map(() => 1), withGamma: false }],
  );
}
