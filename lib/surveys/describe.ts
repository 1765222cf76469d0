/** A change line in plain words, as a customer reads it. */
interface Change {
  action: string;
  oldQuantity: string;
  newQuantity: string;
  newType: string;
}

const count = (quantity: string) => String(Number(quantity));

export function describeChange(line: Change, oldType: string | null, newName: string | null): string {
  const fresh = newName ?? (line.newType || 'new light');
  const old = oldType ?? 'light';
  const of = `${count(line.oldQuantity)} × ${old}`;
  const to = `${count(line.newQuantity)} × ${fresh}`;
  switch (line.action) {
    case 'relamp':
      return `${of}: new lamps in the same fixtures, ${to}`;
    case 'bypass':
      return `${of}: rewired past the old ballast, ${to}`;
    case 'external-driver':
      return `${of}: lamps with a driver of their own, ${to}`;
    case 'listed-kit':
      return `${of}: rebuilt with a listed kit, ${to}`;
    case 'new-luminaire':
      return `${of} out, ${to} in`;
    case 'add':
      return `${to} added`;
    case 'remove':
      return `${of} taken away`;
    case 'relocate':
      return `${of} moved`;
    default:
      return `${of}: stays as it is`;
  }
}
