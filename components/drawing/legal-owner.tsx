import type { TitleBlock } from '@/lib/notebooks/types';

interface LegalOwnerProps {
  name: string;
  logo: TitleBlock['logo'];
  /** Where logos are found, the file's hash left out. */
  logoAt: string;
}

/** Whose sheet it is, under the workshop's logo where it has one. */
export function LegalOwner({ name, logo, logoAt }: LegalOwnerProps) {
  return (
    <>
      {logo && (
        // Decoration beside the name; light behind it, since logos are drawn for paper.
        <img
          src={`${logoAt}/${logo.hash}`}
          width={logo.width}
          height={logo.height}
          alt=""
          className="mb-1 mt-0.5 h-10 print:h-6 w-auto max-w-full bg-[#fff] object-contain object-left"
        />
      )}
      {name}
    </>
  );
}
