import type { Metadata } from 'next';
import { GuidePage, Part, Points } from '../_components/guide-page';
import { NoiseTable } from './_components/noise-table';
import { METHOD_SOURCES, SourceList, TRIAL } from './_components/sources';
import { VerdictRules } from './_components/verdict-rules';

export const metadata: Metadata = { title: 'How Loamline decides whether it worked' };

export default function MethodPage() {
  return (
    <GuidePage
      href="/guide/method"
      title="How Loamline decides whether it worked"
      lead="You spread something to move a number. The next test reads another number. Part of the difference is your work, part is the sampling, the laboratory and the season. The effect check says which part can be told apart."
    >
      <Part title="What is compared">
        <p>
          The change you recorded as meant, against the change between the tests before and the first fitting test
          after. Which tests count is fixed before anybody looks: before-tests at most 24 months old with nothing else
          done to that analyte since; the after-test is the first confirmed one from the day half of the material can
          have acted, at most 24 months after spreading. A test of the same season is preferred. One picked by hand
          instead is marked as a second look.
        </p>
        <p>
          Sulfur and lime act slowly and only in warm soil, so the intention is cut to what can have happened by the day
          of the test: half after about 3 warm months for sulfur and 4 for lime, nine tenths and 85 % after a year of
          them. These shares are our assumption.
        </p>
        <p>
          Where plots that got nothing were sampled on the same days, their change is taken off: it shows what season
          and laboratory did by themselves. The page also gives the verdict without them. Plots are usually treated
          because they read extreme, and an extreme reading comes back a little by itself; from three plots on, the
          before reading is drawn towards the site’s mean by as much as its own error calls for.
        </p>
      </Part>
      <Part title="The seven verdicts" id="verdicts">
        <p>
          All are read off one 90 % interval around the change. “Planned” here means the part due by the day of the
          test.
        </p>
        <VerdictRules />
        <p>
          There is no verdict at all where the tests cannot be set side by side (another extractant, depth, pH medium or
          unit basis), where it is too early, where no after-test is there yet, or where the planned change is too small
          to be seen: below 0.2 pH, or a fifth of what was there. Both values are shown, with the reason.
        </p>
      </Part>
      <Part title="How far two readings differ by themselves" id="noise">
        <p>
          Until your own site has taught its noise, these defaults stand in: standard deviations in pH units, and for
          the others in per cent of the value. Core to core is shared by the cores of the bag, so 15 cores shrink it
          nearly fourfold. Season and laboratory count only where the two tests differ in them.
        </p>
        <NoiseTable />
        <Points>
          <li>
            <strong>published</strong>: printed in the named source.
          </li>
          <li>
            <strong>derived</strong>: worked out by us from a published figure.
          </li>
          <li>
            <strong>assumed</strong>: our own judgement. Nobody has measured it for this use, and none of the figures
            was measured on small, richly amended beds.
          </li>
        </Points>
        <p>
          None of the defaults is a published figure as it stands. Each is believed only as if it came from eight pairs
          of samples; duplicates of your own, and your untreated plots, soon outweigh it.
        </p>
        <p>The published figures they were set against:</p>
        <SourceList sources={METHOD_SOURCES} />
      </Part>
      <Part title="How it was checked">
        <Points>
          <li>
            Against a second program: the same rules written in R, and more than a hundred numbers computed there, which
            our tests compare with.
          </li>
          <li>
            Against an open liming trial: on all 24 limed plots the check must see the first lime, alone and beside
            untreated plots; where no lime was spread it may not see a rise more often than the 5 % it allows itself,
            beyond what chance explains. That trial published no intended change, so it tests whether a change is seen,
            not whether the size was right.
          </li>
        </Points>
        <SourceList sources={[TRIAL]} />
      </Part>
      <Part title="What it cannot do">
        <Points>
          <li>
            It does not prove a cause. Something else that happened on the plot between the tests may have done it.
          </li>
          <li>With one plot and two tests it will often say “cannot tell yet”. It then names what would settle it.</li>
          <li>Analytes without a noise figure get no verdict rather than a made-up one.</li>
        </Points>
      </Part>
    </GuidePage>
  );
}
