import { solveDrawingSchema } from '@/lib/api/loops';
import { route } from '@/lib/server/http/route';
import { solveDrawing } from '@/lib/server/solving/solve-drawing';

export const POST = route({
  permission: 'drawing.solve',
  scope: 'loop',
  body: solveDrawingSchema,
  maxBytes: 16 << 20,
  handle: ({ person, body, params, request }) => solveDrawing(body.drawing, params.loopId, { personId: person.id, signal: request.signal }),
});
