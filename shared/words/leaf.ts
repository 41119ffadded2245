/** Whether a step's name says that leaf is laid in it. A table's leaf is sanded, not laid. */
export function namesLeaf(name: string): boolean {
  return /\b(?:lay|lays|laying)\b.*\bleaf\b|\bleafing\b|\bgild(?:ing)?\b/i.test(name)
}
