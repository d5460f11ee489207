import type { Metadata } from 'next';
import { GuidePage, Part, Points, Steps } from '../_components/guide-page';

export const metadata: Metadata = { title: 'Upload and review a report' };

export default function UploadGuide() {
  return (
    <GuidePage
      href="/guide/upload-and-review"
      title="Upload and review a report"
      lead="From the file a laboratory sent to values that count. The machine reads; you decide."
    >
      <Part title="Send the file">
        <Steps>
          <li>
            Open the site and drop the report on the plot it belongs to. Without a mouse: choose the plot in the list
            and press the button for a report. A report with several samples may go onto any of its plots.
          </li>
          <li>
            Wait while it is read; you may leave the page. PDF files, scans and photos are read, and so are data files:
            CSV, workbooks (XLSX, XLS), plain text, and the open laboratory format as XML or JSON. A scanned page takes
            some seconds longer. A file that was sent before is recognised and offered to open.
          </li>
          <li>
            Have a report only on paper? Scan it, or photograph it from straight above in even light, the whole sheet in
            the picture. It can also be typed in with no file at all.
          </li>
        </Steps>
      </Part>
      <Part title="Check it against its page">
        <Steps>
          <li>Say which plot each sample is from, the day it was taken and the depth, or leave a sample out.</li>
          <li>
            Go through the rows. The value in focus is outlined on the page; a press on the page goes to its row. Values
            that look doubtful come first, each with the reason.
          </li>
          <li>
            Mend what is wrong. Every cell saves itself; if somebody else changed it meanwhile, you see both values and
            choose.
          </li>
          <li>Confirm. From then on the values are history.</li>
        </Steps>
      </Part>
      <Part title="Good to know">
        <Points>
          <li>Helpers can do all of this but confirm; an owner or adviser does that.</li>
          <li>The same analysis as PDF and as CSV counts once, when you say that they are the same.</li>
          <li>
            A wrong confirmation can be withdrawn, and a single value corrected. Both keep what stood there before, with
            who and why.
          </li>
          <li>Recommendations printed by the laboratory are kept apart from its measurements.</li>
        </Points>
      </Part>
    </GuidePage>
  );
}
