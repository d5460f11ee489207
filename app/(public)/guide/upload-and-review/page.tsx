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
          <li>
            Numbers that came in a mail are pasted under Reports: the text is kept and read like a file. A spreadsheet
            of your own with old results is brought in there as well; you say once what each column holds, and its
            values stand in the history as typed by you.
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
      <Part title="What it learns from you">
        <Points>
          <li>
            A confirmed report keeps what each label of its form meant: analyte, method and unit. The next report of
            that form is read with it, and its rows say on which day you confirmed that.
          </li>
          <li>
            It fills only what a page leaves open. Where a page says something else, it asks; no doubt is ever taken
            away. What one site learnt reaches no other.
          </li>
          <li>
            Reports, What was learnt: every form with its labels, and a button that forgets it. Withdrawing a
            confirmation takes back what only that report taught.
          </li>
          <li>
            Rows are held against the history of their plot too: a number that is twice the last one, another unit or
            method, a sample under a new name.
          </li>
        </Points>
      </Part>
      <Part title="Old years at once">
        <Steps>
          <li>
            Drop up to a hundred files at once on the site or under Reports. They get a list of their own: what is being
            sent, read, ready or refused, each with its reason. Leave the page in the middle and nothing is lost; choose
            the folder again, and only what is missing is sent.
          </li>
          <li>
            Give all samples their plots on that list. Choose rows with the space bar, Shift and the arrows, then the
            plot. Where a name fits a plot, or was confirmed for one before, that plot is proposed.
          </li>
          <li>
            Review one after another: after each confirmation the next report of the list stands under Enter, and Alt+R
            goes to it from anywhere. Tick the box to be written to once all are read.
          </li>
        </Steps>
      </Part>
      <Part title="When a page was read wrong">
        <Points>
          <li>
            On the report, This was read wrong makes a copy of the page on which everything but values, units, analytes,
            methods, ratings and headings is blacked out, with what the reader made of it. Nothing is sent: you look at
            it, and take it or throw it away. It is cleared away after a day.
          </li>
          <li>
            What failed every time it was tried stands under Settings, What was given up. An owner has it done again
            with one button.
          </li>
        </Points>
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
