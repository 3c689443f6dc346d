import type { LoopState } from '@/lib/api/loops';
import type { ReportContent, Signature } from '@/lib/api/reports';

/** What a workbook is made of: the content and where it stands when the workbook is made. */
export interface ReportOnPaper {
  content: ReportContent;
  contentSha256: string;
  state: LoopState;
  signatures: Signature[];
  /** Number of the accepted report; null while it is none. */
  acceptedNumber: number | null;
  /** When the workbook is made. */
  at: Date;
}

/** Heads each sheet and foots each page. */
export const referenceOf = ({ content, acceptedNumber }: ReportOnPaper): string => {
  const report = acceptedNumber === null ? 'not accepted' : `accepted report ${acceptedNumber}`;
  return `${content.project.name} / ${content.loop.name}, revision ${content.revision.number}, ${report}`;
};
