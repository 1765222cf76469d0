/** Every model, initialised when the database is first used. Import models from here, not from their files. */
import { registerModels } from '@/lib/platform/db';
import { Shop, initShop } from './shop';
import { Membership, initMembership } from './membership';
import { Customer, initCustomer } from './customer';
import { AuditEvent, initAuditEvent } from './audit-event';
import { IdempotencyKey, initIdempotencyKey } from './idempotency-key';
import { OutboxMessage, initOutboxMessage } from './outbox-message';
import { Counter, initCounter } from './counter';
import { StoredFile, initStoredFile } from './stored-file';
import { Site, initSite } from './site';
import { Job, initJob } from './job';
import { Area, initArea } from './area';
import { ExistingLuminaire, initExistingLuminaire } from './existing-luminaire';
import { Cove, initCove } from './cove';
import { Part, initPart } from './part';
import { PartPrice, initPartPrice } from './part-price';
import { Circuit, initCircuit } from './circuit';
import { ChangeLine, initChangeLine } from './change-line';
import { FindingOverride, initFindingOverride } from './finding-override';
import { ClientEvent, initClientEvent } from './client-event';
import { PublishedDocument, initPublishedDocument } from './published-document';
import { DocumentEvent, initDocumentEvent } from './document-event';
import { QuoteDraft, initQuoteDraft } from './quote-draft';
import { QuoteLine, initQuoteLine } from './quote-line';
import { CustomerLink, initCustomerLink } from './customer-link';
import { Acceptance, initAcceptance } from './acceptance';
import { PaymentSession, initPaymentSession } from './payment-session';
import { Payment, initPayment } from './payment';
import { PaymentEvent, initPaymentEvent } from './payment-event';
import { Visit, initVisit } from './visit';
import { VisitCrew, initVisitCrew } from './visit-crew';
import { SheetEvent, initSheetEvent } from './sheet-event';
import { Photo, initPhoto } from './photo';
import { JobClosing, initJobClosing } from './job-closing';
import { IlluminanceReading, initIlluminanceReading } from './illuminance-reading';
import { UtilityAccount, initUtilityAccount } from './utility-account';
import { LuminaireType, initLuminaireType } from './luminaire-type';

registerModels((sequelize) => {
  initShop(sequelize);
  initMembership(sequelize);
  initCustomer(sequelize);
  initAuditEvent(sequelize);
  initIdempotencyKey(sequelize);
  initOutboxMessage(sequelize);
  initCounter(sequelize);
  initStoredFile(sequelize);
  initSite(sequelize);
  initJob(sequelize);
  initArea(sequelize);
  initExistingLuminaire(sequelize);
  initCove(sequelize);
  initPart(sequelize);
  initPartPrice(sequelize);
  initCircuit(sequelize);
  initChangeLine(sequelize);
  initFindingOverride(sequelize);
  initClientEvent(sequelize);
  initPublishedDocument(sequelize);
  initDocumentEvent(sequelize);
  initQuoteDraft(sequelize);
  initQuoteLine(sequelize);
  initCustomerLink(sequelize);
  initAcceptance(sequelize);
  initPaymentSession(sequelize);
  initPayment(sequelize);
  initPaymentEvent(sequelize);
  initVisit(sequelize);
  initVisitCrew(sequelize);
  initSheetEvent(sequelize);
  initPhoto(sequelize);
  initJobClosing(sequelize);
  initIlluminanceReading(sequelize);
  initUtilityAccount(sequelize);
  initLuminaireType(sequelize);
});

export {
  Shop,
  Membership,
  Customer,
  AuditEvent,
  IdempotencyKey,
  OutboxMessage,
  Counter,
  StoredFile,
  Site,
  Job,
  Area,
  ExistingLuminaire,
  Cove,
  Part,
  PartPrice,
  Circuit,
  ChangeLine,
  FindingOverride,
  ClientEvent,
  PublishedDocument,
  DocumentEvent,
  QuoteDraft,
  QuoteLine,
  CustomerLink,
  Acceptance,
  PaymentSession,
  Payment,
  PaymentEvent,
  Visit,
  VisitCrew,
  SheetEvent,
  Photo,
  JobClosing,
  IlluminanceReading,
  UtilityAccount,
  LuminaireType,
};
