import { Link, type Href } from 'expo-router';
import type { ReactElement } from 'react';
import { Anchor } from '@/components/ui/Anchor';
import type { ButtonProps } from '@/components/ui/Button';
import { Icon } from '@/components/ui/Icon';

export interface LinkButtonProps extends Pick<ButtonProps, 'label' | 'kind' | 'icon' | 'block' | 'size' | 'accessibleLabel' | 'testID'> {
  href: Href;
  replace?: boolean;
}

/** A link that looks like a button: it goes somewhere, it does nothing. */
export function LinkButton({ href, replace, label, kind = 'quiet', icon, block, size = 'regular', accessibleLabel, testID }: LinkButtonProps): ReactElement {
  return (
    <Link href={href} replace={replace} asChild>
      <Anchor className="d-button" data-kind={kind} data-size={size} data-block={block ? '' : undefined} data-testid={testID} aria-label={accessibleLabel}>
        {icon && <Icon icon={icon} />}
        <span>{label}</span>
      </Anchor>
    </Link>
  );
}
