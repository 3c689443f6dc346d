import Image from 'next/image';
import { Sheet } from '@/components/ui/sheet';

interface DrawingPageProps {
  /** As `drawingSvg` makes it. */
  svg: string;
  width: number;
  height: number;
  /** What it shows, for those who cannot see it. */
  description: string;
}

/** The drawing as it was issued, a page of its own on paper. As an image it runs nothing and brings its own white sheet. */
export const DrawingPage = ({ svg, width, height, description }: DrawingPageProps) => (
  <div className="mt-5 print:break-before-page">
    <Sheet title="The drawing">
      <div className="max-h-[80dvh] overflow-auto rounded border print:max-h-none print:overflow-visible print:border-0">
        <Image
          src={`data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`}
          alt={description}
          width={width}
          height={height}
          unoptimized
          className="h-auto w-full min-w-[48rem] print:min-w-0"
        />
      </div>
    </Sheet>
  </div>
);
