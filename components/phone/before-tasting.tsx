'use client';

import { Rich, useWords } from '@/components/i18n/words';
import type { Allergen } from '@/db/enums';

/** What somebody must know before the first glass: allergens, alcohol, the way out. */
export function BeforeTasting({ allergens }: { allergens: readonly Allergen[] }) {
  const t = useWords();
  const list = new Intl.ListFormat(t.locale).format(allergens.map((allergen) => t(`allergens.${allergen}`)));
  return (
    <div className="stack tight">
      <h2>{t('join.before')}</h2>
      <ul className="stack tight">
        <li>{allergens.length > 0 ? <Rich t={t} id="join.allergens" values={{ list }} /> : t('join.noAllergens')}</li>
        <li><Rich t={t} id="join.spit" /></li>
        <li>{t('join.optOut')}</li>
        <li>{t('join.alone')}</li>
      </ul>
    </div>
  );
}
