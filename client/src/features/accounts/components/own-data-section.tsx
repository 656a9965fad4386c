import { ButtonAnchor } from '../../../ui/button';
import { OWN_DATA } from '../api/own-account';
import { AccountSection } from './account-section';
import styles from './account-section.module.css';

export function OwnDataSection() {
  return (
    <AccountSection
      title="Your data"
      about="One file with everything that is kept about you: your account, sign-ins, circles and what you did in them. Tunes and evenings are the circle's; its pages export them."
    >
      <div className={styles.do}>
        <ButtonAnchor look="outline" href={OWN_DATA} download>
          Download my data
        </ButtonAnchor>
      </div>
    </AccountSection>
  );
}
