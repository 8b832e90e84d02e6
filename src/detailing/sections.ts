import { sectionNamed } from '../model/catalogue/resolve.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { Section } from '../model/section.js';
import type { Truss } from '../model/truss.js';

/** The section of each member, by the member's index: its own, else its group's, else the job's; null where the name is unknown. */
export function sectionsOf(
  truss: Truss,
  job: Job,
): { readonly sections: readonly (Section | null)[]; readonly findings: readonly Finding[] } {
  const findings: Finding[] = [];
  const sections = truss.members.map((member) => {
    const byGroup = member.group === null ? undefined : job.struts.groups[member.group];
    const name = member.section ?? byGroup ?? job.struts.section;
    const section = sectionNamed(job, name);
    if (!section) findings.push(finding('section-unknown', member.mark, { about: { section: name } }));
    return section;
  });
  return { sections, findings };
}
