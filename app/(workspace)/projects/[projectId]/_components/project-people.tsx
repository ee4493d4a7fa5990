'use client';

import { useRouter } from 'next/navigation';
import { ActionForm } from '@/components/form/action-form';
import { ConfirmButton } from '@/components/form/confirm-button';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { Select } from '@/components/ui/input';
import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import { appointmentRoles, type AppointmentRole, type Member, type ProjectDetail } from '@/lib/domain/dto';
import { appointmentForm } from '@/lib/domain/forms';
import { appoint, removeAppointment } from '../../actions';

const partWords: Record<AppointmentRole, string> = {
  author: 'Draws and solves.',
  checker: 'Forms an own answer, comments, signs.',
  approver: 'Seals and issues.',
  client: 'Reads what is issued to them.',
};

/** Who does what on a project. */
export function ProjectPeople({ project, members }: { project: ProjectDetail; members: Member[] }) {
  return (
    <div className="grid gap-8">
      {project.people.length > 0 && (
        <Table caption="People on this project">
          <thead>
            <tr>
              <HeadCell>Name</HeadCell>
              <HeadCell className="hidden sm:table-cell">E-mail</HeadCell>
              <HeadCell>Part</HeadCell>
            </tr>
          </thead>
          <tbody>
            {project.people.map((person) => (
              <tr key={person.userId}>
                <RowHead>{person.name}</RowHead>
                <Cell className="hidden break-all sm:table-cell">{person.email}</Cell>
                <Cell>
                  <ul className="grid gap-1">
                    {person.roles.map((role) => (
                      <li key={role} className="flex flex-wrap items-baseline gap-x-4">
                        <span>{role}</span>
                        {project.may.appoint && (
                          <ConfirmButton
                            label="Remove"
                            accessibleLabel={`Remove ${person.name} as ${role}`}
                            title={`Remove ${person.name} as ${role}?`}
                            consequence={`${person.name} loses what a ${role} may do on this project, at once. Nothing they wrote is removed, and they can be appointed again.`}
                            confirmLabel="Remove"
                            action={() =>
                              removeAppointment({ projectId: project.id, userId: person.userId, role })
                            }
                          />
                        )}
                      </li>
                    ))}
                  </ul>
                </Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      {project.people.length === 0 && <p className="text-secondary">Nobody is appointed yet.</p>}
      {project.may.appoint && <AppointForm projectId={project.id} members={members} />}
    </div>
  );
}

function AppointForm({ projectId, members }: { projectId: string; members: Member[] }) {
  const router = useRouter();
  const form = useActionForm({
    schema: appointmentForm,
    defaultValues: { projectId, userId: '', role: 'checker' },
    action: appoint,
    onDone: () => {
      form.reset();
      router.refresh();
    },
  });
  const { errors } = form.formState;
  return (
    <ActionForm state={form} label="Appoint somebody" submitLabel="Appoint" className="max-w-2xl">
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Person" error={errors.userId?.message}>
          <Select {...form.register('userId')}>
            <option value="">Choose a member</option>
            {members.map((member) => (
              <option key={member.userId} value={member.userId}>
                {member.name} ({member.role})
              </option>
            ))}
          </Select>
        </Field>
        <Field label="Part" hint={partWords[form.watch('role')]} error={errors.role?.message}>
          <Select {...form.register('role')}>
            {appointmentRoles.map((role) => (
              <option key={role} value={role}>
                {role}
              </option>
            ))}
          </Select>
        </Field>
      </div>
    </ActionForm>
  );
}
