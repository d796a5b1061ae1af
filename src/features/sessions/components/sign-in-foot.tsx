import { dayOfYear, toIso } from '../../../../shared/time.ts';
import { Button } from '../../../components/button.tsx';
import { useNow } from '../../../hooks/use-now.ts';
import { clockSeconds } from '../../../lib/format-time.ts';
import { chooseTheme, useShownTheme } from '../../../lib/theme.ts';

export function SignInFoot() {
  const now = useNow();
  const theme = useShownTheme();
  const other = theme === 'dark' ? 'light' : 'dark';
  return (
    <div className="figures mt-auto flex items-end justify-between gap-4 pt-10">
      <div>
        <p className="flex items-baseline gap-1.5">
          <time dateTime={toIso(now)} className="text-page font-medium">
            {clockSeconds(now)}
          </time>
          <span className="text-caption font-semibold">UTC</span>
        </p>
        <p className="text-caption text-ink-muted">
          {toIso(now).slice(0, 10)}, day {dayOfYear(now)}
        </p>
      </div>
      <Button
        size="small"
        icon={other === 'dark' ? 'moon' : 'sun'}
        onClick={() => chooseTheme(other)}
      >
        {other === 'dark' ? 'Dark' : 'Light'}
      </Button>
    </div>
  );
}
