/**
 * A path moved and scaled in its own numbers. A transform on the element would make the browser keep a layer of
 * sorting for each of hundreds of marks, in every frame in which the drawing moves.
 * @param d of the commands M, L, H, V, Z and the relative m, l, h, v, a
 */
export function placedPath(d: string, at: { x: number; y: number; scale?: number }): string {
  const scale = at.scale ?? 1;
  return [...d.matchAll(/([a-zA-Z])([^a-zA-Z]*)/g)]
    .map(([, command, rest]) => {
      const values = (rest!.match(/-?\d*\.?\d+/g) ?? []).map(Number);
      return (
        command! + values.map((value, index) => rounded(placed(command!, index, value, at, scale))).join(' ')
      );
    })
    .join('');
}

function placed(
  command: string,
  index: number,
  value: number,
  at: { x: number; y: number },
  scale: number,
): number {
  if (command === 'a') return [2, 3, 4].includes(index % 7) ? value : value * scale;
  if (command === command.toLowerCase()) return value * scale;
  const isAcross = command === 'H' || (command !== 'V' && index % 2 === 0);
  return value * scale + (isAcross ? at.x : at.y);
}

function rounded(value: number): number {
  return Math.round(value * 1000) / 1000;
}
