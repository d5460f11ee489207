import { RefusalBox } from '@/lib/ui/verdict/refusal-box';
import { VerdictLine } from '@/lib/ui/verdict/verdict-line';

export function VerdictsSection() {
  return (
    <div className="grid gap-8">
      <div className="grid gap-8 lg:grid-cols-2">
        <VerdictLine
          verdict="as intended"
          sentence="pH fell by 0.46 (0.32 to 0.60); 0.5 was planned."
          comparedWith="compared with the untreated plots"
        />
        <VerdictLine verdict="short of it" sentence="pH fell by 0.21 (0.05 to 0.37), less than the 0.5 planned." />
        <VerdictLine verdict="beyond it" sentence="pH fell by 0.94 (0.71 to 1.17), more than the 0.5 planned." />
        <VerdictLine
          verdict="no change seen"
          sentence="pH fell by 0.04 (−0.13 to 0.21), and less than half of the plan is left in the running."
        />
        <VerdictLine
          verdict="went the other way"
          sentence="pH rose by 0.31 (0.12 to 0.50); a fall of 0.5 was planned."
        />
        <VerdictLine
          verdict="right way, size not settled"
          sentence="pH fell. Anywhere between 0.17 and 0.79 fits these samples; 0.5 was planned."
          settledBy="a second composite each time."
        />
        <VerdictLine
          verdict="cannot tell yet"
          sentence="pH fell by 0.21, but anything from a fall of 0.58 to a rise of 0.16 fits these samples."
          settledBy="15 cores and one untreated plot next time."
        />
        <VerdictLine verdict="as intended" sentence="pH fell by 0.46 (0.32 to 0.60); 0.5 was planned." size="small" />
      </div>
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <RefusalBox
          refusal="not comparable"
          reason="These two numbers come from different tests. Each is fine by itself; their difference is not a change in the soil."
          help="ask for the same method, Mehlich-3, next time."
          values={[
            { label: '11 Apr 2025', printed: '62 ppm', note: 'Mehlich-3' },
            { label: '14 Apr 2026', printed: '41 ppm', note: 'Bray P1' },
          ]}
        />
        <RefusalBox
          refusal="too early"
          reason="Less than half of the sulfur can have reacted by 3 July 2026."
          help="a sample from 2 September 2026 on."
        />
        <RefusalBox
          refusal="planned change too small to check"
          reason="A fall of 0.1 was planned. Soil tests cannot show a step under 0.2."
          help="judge it over three seasons, or plan a larger step."
        />
      </div>
    </div>
  );
}
