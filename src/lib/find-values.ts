import { ChainSearchResponse } from '#shared/contracts/chains.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import type { ComboboxOption } from '#src/components/ui/combobox.tsx';
import { get } from './api-client.ts';

/** Values in force of weights that this person reads in full, as a `Combobox` offers them; `id` is the value's uid. */
export async function findValues(text: string, signal?: AbortSignal): Promise<ComboboxOption[]> {
  const { values } = await get('/api/chains', ChainSearchResponse, { query: { q: text }, signal });
  return values.map((value) => ({
    id: value.uid,
    label: `${value.registryNo}, ${nominalText(value.nominal)}`,
    detail: `${value.quantity}, ${value.performedEnd}, ${value.holder.name}`,
  }));
}
