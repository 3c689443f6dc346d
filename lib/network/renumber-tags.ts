import type { Drawing, Equipment, TagRules } from './drawing';
import { mapPieces } from './move-pieces';
import { tagMaker } from './tags';

export interface TagChange {
  id: string;
  from: string;
  to: string;
}

/**
 * New tags by the rules for the chosen pieces, or for all where `ids` is null: counted from the lowest storey up, in each
 * from left to right and then from the top down. A tag that a piece outside of the choice bears is passed over, so that no
 * tag ever stands twice. Only the pieces whose tag changes are listed.
 */
export function tagChanges(drawing: Drawing, rules: TagRules, ids: ReadonlySet<string> | null): TagChange[] {
  const isChosen = ({ id }: Equipment) => ids === null || ids.has(id);
  const taken = new Set(drawing.equipment.filter((piece) => !isChosen(piece)).map(({ tag }) => tag));
  const reached = new Map<string, number>();
  return inReadingOrder(drawing)
    .filter(isChosen)
    .flatMap((piece) => {
      const make = tagMaker(drawing, piece, rules);
      const series = make(0);
      let count = reached.get(series) ?? 0;
      let to: string;
      do to = make(++count);
      while (taken.has(to));
      reached.set(series, count);
      taken.add(to);
      return to === piece.tag ? [] : [{ id: piece.id, from: piece.tag, to }];
    });
}

/** Gives the pieces their new tags and keeps the rules for pieces to come. */
export function renumberTags(drawing: Drawing, rules: TagRules, ids: ReadonlySet<string> | null): Drawing {
  const tags = new Map(tagChanges(drawing, rules, ids).map(({ id, to }) => [id, to]));
  return { ...mapPieces(drawing, new Set(tags.keys()), (piece) => ({ ...piece, tag: tags.get(piece.id)! })), tagRules: rules };
}

function inReadingOrder({ equipment, storeys }: Drawing): Equipment[] {
  const rising = new Map([...storeys].sort((a, b) => a.elevationM - b.elevationM || b.top - a.top).map(({ id }, at) => [id, at]));
  const storeyOf = ({ storeyId }: Equipment) => (storeyId === null ? -1 : (rising.get(storeyId) ?? -1));
  return [...equipment].sort((a, b) => storeyOf(a) - storeyOf(b) || a.x - b.x || a.y - b.y);
}
