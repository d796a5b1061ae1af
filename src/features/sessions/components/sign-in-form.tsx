import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { SignIn, type Session } from '../../../../shared/schemas/session.ts';
import { Button } from '../../../components/button.tsx';
import { TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { useSignIn } from '../../../queries/session-queries.ts';

export function SignInForm({ demo, onDone }: { demo: Session['demo']; onDone: () => void }) {
  const signIn = useSignIn();
  const [shown, setShown] = useState(false);
  const { register, handleSubmit, setValue, formState } = useForm<SignIn>({
    resolver: zodResolver(SignIn),
    defaultValues: { email: '', password: '' },
  });
  const { errors } = formState;
  return (
    <>
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) =>
          void handleSubmit((body) => signIn.mutate(body, { onSuccess: onDone }))(event)
        }
      >
        <TextField
          label="E-mail"
          type="email"
          large
          autoComplete="username"
          spellCheck={false}
          error={errors.email && 'Write the whole address, such as name@station.example'}
          {...register('email')}
        />
        <TextField
          label="Password"
          type={shown ? 'text' : 'password'}
          large
          autoComplete="current-password"
          error={errors.password && 'Write your password'}
          {...register('password')}
        />
        <button
          type="button"
          className="link -mt-2.5 min-h-6 self-end text-caption"
          aria-pressed={shown}
          onClick={() => setShown(!shown)}
        >
          {shown ? 'Hide what I type' : 'Show what I type'}
        </button>
        <ErrorNote error={signIn.error} />
        <Button type="submit" variant="primary" size="large" busy={signIn.isPending}>
          Sign in
        </Button>
      </form>
      {demo && (
        <DemoAccounts
          demo={demo}
          onChoose={(email) => {
            setValue('email', email);
            setValue('password', demo.password);
          }}
        />
      )}
    </>
  );
}

interface DemoProps {
  demo: NonNullable<Session['demo']>;
  onChoose: (email: string) => void;
}

/** The demo's people fill the form; nobody is signed in by a link. */
function DemoAccounts({ demo, onChoose }: DemoProps) {
  return (
    <section aria-labelledby="demo" className="mt-6 border-t border-line pt-4">
      <h2 id="demo" className="text-table font-semibold">
        Demo of {demo.seededUtc.slice(0, 10)}
      </h2>
      <p className="mt-0.5 mb-2.5 text-caption text-ink-muted">
        Everything in it is invented. Choose a role to fill the form, then sign in.
      </p>
      <div className="flex flex-wrap gap-2">
        {demo.accounts.map(({ role, email }) => (
          <Button key={email} size="small" onClick={() => onChoose(email)}>
            {role}
          </Button>
        ))}
      </div>
    </section>
  );
}
