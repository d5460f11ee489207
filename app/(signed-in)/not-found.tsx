import { LinkButton } from '@/lib/ui/actions/link-button';
import { PageTitle } from '@/lib/ui/frame/page-title';

export default function SignedInNotFound() {
  return (
    <>
      <PageTitle title="Nothing here" lead="It was moved or removed, or it is not yours to see. Nothing was changed." />
      <div className="page-wrap">
        <LinkButton href="/today">Go to your sites</LinkButton>
      </div>
    </>
  );
}
