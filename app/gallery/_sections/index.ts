import type { ComponentType } from 'react';
import { GridGallery } from '@/lib/ui/grid/grid-gallery';
import { PageViewGallery } from '@/lib/ui/page-view/page-view-gallery';
import { SitePlanGallery } from '@/lib/ui/site-plan/site-plan-gallery';
import { ActionsSection } from './actions';
import { ChartsSection } from './charts';
import { ColoursSection } from './colours';
import { DialogsSection } from './dialogs';
import { EmailsSection } from './emails';
import { FieldsSection } from './fields';
import { FilesSection } from './files';
import { FrameSection } from './frame';
import { MessagesSection } from './messages';
import { ShowSection } from './show';
import { TypeSection } from './type';
import { VerdictsSection } from './verdicts';
import { WaitingSection } from './waiting';

type GallerySection = { id: string; title: string; Section: ComponentType };

/** A new part of the screens gets a file beside this one and a line here. */
export const sections: readonly GallerySection[] = [
  { id: 'colours', title: 'Colours', Section: ColoursSection },
  { id: 'type', title: 'Type and logo', Section: TypeSection },
  { id: 'actions', title: 'Buttons, menus, choices', Section: ActionsSection },
  { id: 'fields', title: 'Fields and forms', Section: FieldsSection },
  { id: 'messages', title: 'Messages', Section: MessagesSection },
  { id: 'dialogs', title: 'Dialogs', Section: DialogsSection },
  { id: 'waiting', title: 'Waiting, working, empty', Section: WaitingSection },
  { id: 'show', title: 'Tables, lists, timelines', Section: ShowSection },
  { id: 'files', title: 'Files', Section: FilesSection },
  { id: 'frame', title: 'Whole pages', Section: FrameSection },
  { id: 'charts', title: 'Charts', Section: ChartsSection },
  { id: 'verdicts', title: 'Verdicts', Section: VerdictsSection },
  { id: 'grid', title: 'Review grid', Section: GridGallery },
  { id: 'page', title: 'Page view', Section: PageViewGallery },
  { id: 'plan', title: 'Site plan', Section: SitePlanGallery },
  { id: 'emails', title: 'E-mails', Section: EmailsSection },
];
