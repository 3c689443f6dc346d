import type { Meaning, Sign } from '@/lib/api/reports';
import { problemSchema } from '@/lib/api/problem';
import { RequestError, send } from './http';

const routeOf: Record<Meaning, string> = { submitted: 'submission', reviewed: 'review', returned: 'review', accepted: 'acceptance' };

/** Puts the person's signature under the report that they saw. */
export const signReport = (loopId: string, { meaning, ...sign }: Sign): Promise<{ submission: number }> =>
  send('POST', `/api/loops/${loopId}/${routeOf[meaning]}`, routeOf[meaning] === 'review' ? { meaning, ...sign } : sign);

/** Fetches the workbook and hands it to the browser to keep; without a number the report as it stands. */
export async function downloadWorkbook(loopId: string, number?: number): Promise<void> {
  const path = `/api/loops/${loopId}/report/workbook${number === undefined ? '' : `?number=${number}`}`;
  let response: Response;
  try {
    response = await fetch(path);
  } catch {
    throw new RequestError('offline', 'The server could not be reached. Check the connection and try again.', 0);
  }
  if (!response.ok) {
    const { data } = problemSchema.safeParse(await response.json().catch(() => null));
    throw new RequestError(
      data?.code ?? 'unexpected',
      data?.title ?? `The server answered ${response.status}. Try again.`,
      response.status,
      data ?? null,
    );
  }
  const link = document.createElement('a');
  link.href = URL.createObjectURL(await response.blob());
  link.download = /filename="([^"]+)"/.exec(response.headers.get('content-disposition') ?? '')?.[1] ?? 'report.xlsx';
  link.click();
  URL.revokeObjectURL(link.href);
}
