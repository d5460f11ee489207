'use client';

import { useId, useState } from 'react';
import type { Member } from '@/lib/schemas/sites';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Dialog } from '@/lib/ui/feedback/dialog';
import { Form } from '@/lib/ui/fields/form';
import { RadioGroup } from '@/lib/ui/fields/radio-group';
import { useSubmit } from '@/lib/ui/use-submit';
import { ROLE_OPTIONS } from './role-options';

type ChangeRoleProps = { path: string; member: Member; onChanged: () => void };

/** In a dialog with a button of its own: a list that saves at each arrow key would hand out roles in passing. */
export function ChangeRole({ path, member, onChanged }: ChangeRoleProps) {
  const { send, busy, problem, clear } = useSubmit();
  const [open, setOpen] = useState(false);
  const announce = useAnnounce();
  const id = useId();
  const show = (next: boolean) => {
    clear();
    setOpen(next);
  };
  const save = async ({ role = member.role }: Record<string, string>) => {
    const result = await send(path, { method: 'PATCH', body: { role } });
    if (!result.ok) return;
    setOpen(false);
    announce(`${member.name} is now ${role}.`, { tone: 'saved' });
    onChanged();
  };
  return (
    <>
      <Button
        size="small"
        look="quiet"
        aria-haspopup="dialog"
        aria-label={`Change the role of ${member.name}`}
        onClick={() => show(true)}
      >
        Change the role
      </Button>
      <Dialog open={open} onOpenChange={show} title={`The role of ${member.name}`}>
        <Form problem={problem} onSubmit={save}>
          <RadioGroup name="role" label="Role" hideLabel options={ROLE_OPTIONS} defaultValue={member.role} id={id} />
          <div className="flex flex-wrap gap-3">
            <Button type="submit" busy={busy} busyLabel="Saving">
              Save the role
            </Button>
            <Button look="quiet" onClick={() => show(false)}>
              Leave it
            </Button>
          </div>
        </Form>
      </Dialog>
    </>
  );
}
