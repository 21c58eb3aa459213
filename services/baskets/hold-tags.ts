import { basketById } from '@/db/repositories/baskets';
import { tagsOf } from '@/db/repositories/hold-tags';
import { reading } from '@/db/work';
import type { HoldTag } from '@/services/contracts/baskets';
import { dataMatrixOutline } from '@/services/labels/data-matrix';

/** The hold tags of a basket: one for each part that was signed as anything but accepted. Undefined when there is no such basket. */
export async function readHoldTags(
  basketId: string,
): Promise<{ readonly number: string; readonly tags: readonly HoldTag[] } | undefined> {
  const basket = await basketById(reading(), basketId);
  if (!basket) return undefined;
  const rows = await tagsOf(reading(), basketId);
  const { number, partNumber, operation, title } = basket;
  return {
    number,
    tags: rows.map((row) => ({ ...row, basket: number, partNumber, operation, title, code: dataMatrixOutline(row.serial) })),
  };
}
