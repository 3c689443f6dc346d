import { solveDrawingSchema } from '@/lib/api/loops';
import { route } from '@/lib/server/http/route';
import { solveDrawing } from '@/lib/server/loops/solve-drawing';

export const POST = route({
  permission: 'drawing.solve',
  scope: 'loop',
  body: solveDrawingSchema,
  maxBytes: 16 << 20,
  handle: async ({ body, params }) => solveDrawing(body.drawing, params.loopId!),
});
