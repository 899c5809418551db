/**
 * Generic trouble codes for fuel, air, ignition and emission work: SAE J2012 / ISO 15031-6 codes, meanings in our own
 * words. A row is `code|system index|meaning|bank|sensor|cylinder`, empty where the code says nothing.
 */
export const CODE_SYSTEMS = [
  "EGR",
  "air metering",
  "boost",
  "catalyst",
  "control module and supply",
  "crank/cam position",
  "evaporative",
  "fuel delivery",
  "idle and throttle",
  "ignition",
  "injector",
  "knock",
  "misfire",
  "mixture / fuel trim",
  "oxygen sensor",
  "secondary air",
  "temperature sensing",
  "throttle control",
  "valve timing",
  "vehicle speed and inputs",
] as const;

export const CODE_ROWS = `
P0001|7|fuel volume regulator control: circuit fault or open|||
P0002|7|fuel volume regulator control: implausible behaviour|||
P0003|7|fuel volume regulator control: circuit low|||
P0004|7|fuel volume regulator control: circuit high|||
P0005|7|fuel shutoff valve control: open circuit|||
P0006|7|fuel shutoff valve control: circuit low|||
P0007|7|fuel shutoff valve control: circuit high|||
P0008|18|cam/crank phase of the bank off (whole bank, chain or belt drive)|1||
P0009|18|cam/crank phase of the bank off (whole bank, chain or belt drive)|2||
P000A|18|intake (A) cam phaser responds slowly|1||
P000B|18|exhaust (B) cam phaser responds slowly|1||
P000C|18|intake (A) cam phaser responds slowly|2||
P000D|18|exhaust (B) cam phaser responds slowly|2||
P0010|18|intake (A) cam phaser actuator circuit|1||
P0011|18|intake (A) cam too far advanced or phaser not following|1||
P0012|18|intake (A) cam too far retarded|1||
P0013|18|exhaust (B) cam phaser actuator circuit|1||
P0014|18|exhaust (B) cam too far advanced or phaser not following|1||
P0015|18|exhaust (B) cam too far retarded|1||
P0016|18|crank signal and intake (A) cam signal do not agree|1||
P0017|18|crank signal and exhaust (B) cam signal do not agree|1||
P0018|18|crank signal and intake (A) cam signal do not agree|2||
P0019|18|crank signal and exhaust (B) cam signal do not agree|2||
P0020|18|intake (A) cam phaser actuator circuit|2||
P0021|18|intake (A) cam too far advanced or phaser not following|2||
P0022|18|intake (A) cam too far retarded|2||
P0023|18|exhaust (B) cam phaser actuator circuit|2||
P0024|18|exhaust (B) cam too far advanced or phaser not following|2||
P0025|18|exhaust (B) cam too far retarded|2||
P0030|14|sensor heater control circuit|1|1|
P0031|14|sensor heater control circuit low|1|1|
P0032|14|sensor heater control circuit high|1|1|
P0036|14|sensor heater control circuit|1|2|
P0037|14|sensor heater control circuit low|1|2|
P0038|14|sensor heater control circuit high|1|2|
P0040|14|upstream sensors of the two banks cross-connected||1|
P0041|14|downstream sensors of the two banks cross-connected||2|
P0042|14|sensor heater control circuit|1|3|
P0043|14|sensor heater control circuit low|1|3|
P0044|14|sensor heater control circuit high|1|3|
P0050|14|sensor heater control circuit|2|1|
P0051|14|sensor heater control circuit low|2|1|
P0052|14|sensor heater control circuit high|2|1|
P0053|14|sensor heater resistance out of range|1|1|
P0054|14|sensor heater resistance out of range|1|2|
P0055|14|sensor heater resistance out of range|1|3|
P0056|14|sensor heater control circuit|2|2|
P0057|14|sensor heater control circuit low|2|2|
P0058|14|sensor heater control circuit high|2|2|
P0059|14|sensor heater resistance out of range|2|1|
P0060|14|sensor heater resistance out of range|2|2|
P0061|14|sensor heater resistance out of range|2|3|
P0062|14|sensor heater control circuit|2|3|
P0063|14|sensor heater control circuit low|2|3|
P0064|14|sensor heater control circuit high|2|3|
P0068|1|air flow (MAP or MAF) disagrees with throttle position|||
P0069|1|manifold pressure and barometric pressure disagree|||
P006A|1|manifold pressure and air flow meter disagree|1||
P0070|16|ambient air temperature sensor circuit|||
P0071|16|ambient air temperature sensor implausible|||
P0072|16|ambient air temperature sensor circuit low|||
P0073|16|ambient air temperature sensor circuit high|||
P0074|16|ambient air temperature sensor intermittent|||
P0087|7|fuel rail or system pressure too low|||
P0088|7|fuel rail or system pressure too high|||
P0089|7|fuel pressure regulator 1 not holding commanded pressure|||
P008A|7|low-pressure side fuel pressure too low|||
P008B|7|low-pressure side fuel pressure too high|||
P0090|7|fuel pressure regulator 1 control circuit|||
P0091|7|fuel pressure regulator 1 control circuit low|||
P0092|7|fuel pressure regulator 1 control circuit high|||
P0093|7|fuel leak detected, large|||
P0094|7|fuel leak detected, small|||
P0095|16|intake air temperature sensor 2 circuit|1||
P0096|16|intake air temperature sensor 2 implausible|1||
P0097|16|intake air temperature sensor 2 circuit low|1||
P0098|16|intake air temperature sensor 2 circuit high|1||
P0099|16|intake air temperature sensor 2 intermittent|1||
P009A|16|intake and ambient air temperatures disagree|||
P00B8|1|manifold pressure and air flow meter disagree|2||
P00BC|1|air flow meter A reads less than expected|||
P00BD|1|air flow meter A reads more than expected|||
P0100|1|air flow meter (mass or volume) A circuit|||
P0101|1|air flow meter A implausible|||
P0102|1|air flow meter A circuit low|||
P0103|1|air flow meter A circuit high|||
P0104|1|air flow meter A intermittent|||
P0105|1|manifold/barometric pressure sensor circuit|||
P0106|1|manifold/barometric pressure sensor implausible|||
P0107|1|manifold/barometric pressure sensor circuit low|||
P0108|1|manifold/barometric pressure sensor circuit high|||
P0109|1|manifold/barometric pressure sensor intermittent|||
P010A|1|air flow meter B circuit|||
P010B|1|air flow meter B implausible|||
P010C|1|air flow meter B circuit low|||
P010D|1|air flow meter B circuit high|||
P010F|1|air flow meters A and B disagree|||
P0110|16|intake air temperature sensor 1 circuit|1||
P0111|16|intake air temperature sensor 1 implausible|1||
P0112|16|intake air temperature sensor 1 circuit low (reads hot)|1||
P0113|16|intake air temperature sensor 1 circuit high (reads cold)|1||
P0114|16|intake air temperature sensor 1 intermittent|1||
P0115|16|coolant temperature sensor 1 circuit|||
P0116|16|coolant temperature sensor 1 implausible|||
P0117|16|coolant temperature sensor 1 circuit low (reads hot)|||
P0118|16|coolant temperature sensor 1 circuit high (reads cold)|||
P0119|16|coolant temperature sensor 1 intermittent|||
P011A|16|coolant temperature sensors 1 and 2 disagree|||
P011B|16|coolant and intake air temperatures disagree (after soak)|||
P0120|17|throttle/pedal sensor or switch A circuit|||
P0121|17|throttle/pedal sensor or switch A implausible|||
P0122|17|throttle/pedal sensor or switch A circuit low|||
P0123|17|throttle/pedal sensor or switch A circuit high|||
P0124|17|throttle/pedal sensor or switch A intermittent|||
P0125|16|coolant too cold for closed-loop fuel control|||
P0126|16|coolant too cold for stable operation|||
P0127|16|intake air too hot|||
P0128|16|coolant stays below thermostat opening temperature|||
P0129|1|barometric pressure too low|||
P0130|14|sensor circuit|1|1|
P0131|14|sensor voltage low|1|1|
P0132|14|sensor voltage high|1|1|
P0133|14|sensor slow to respond|1|1|
P0134|14|sensor shows no activity|1|1|
P0135|14|sensor heater circuit|1|1|
P0136|14|sensor circuit|1|2|
P0137|14|sensor voltage low|1|2|
P0138|14|sensor voltage high|1|2|
P0139|14|sensor slow to respond|1|2|
P013A|14|sensor slow rich-to-lean response|1|2|
P013B|14|sensor slow lean-to-rich response|1|2|
P013C|14|sensor slow rich-to-lean response|2|2|
P013D|14|sensor slow lean-to-rich response|2|2|
P013E|14|sensor delayed rich-to-lean response|1|2|
P013F|14|sensor delayed lean-to-rich response|1|2|
P0140|14|sensor shows no activity|1|2|
P0141|14|sensor heater circuit|1|2|
P0142|14|sensor circuit|1|3|
P0143|14|sensor voltage low|1|3|
P0144|14|sensor voltage high|1|3|
P0145|14|sensor slow to respond|1|3|
P0146|14|sensor shows no activity|1|3|
P0147|14|sensor heater circuit|1|3|
P0148|7|fuel delivery not as commanded|||
P0149|7|fuel timing not as commanded|||
P014A|14|sensor delayed rich-to-lean response|2|2|
P014B|14|sensor delayed lean-to-rich response|2|2|
P014C|14|sensor slow rich-to-lean response|1|1|
P014D|14|sensor slow lean-to-rich response|1|1|
P014E|14|sensor slow rich-to-lean response|2|1|
P014F|14|sensor slow lean-to-rich response|2|1|
P0150|14|sensor circuit|2|1|
P0151|14|sensor voltage low|2|1|
P0152|14|sensor voltage high|2|1|
P0153|14|sensor slow to respond|2|1|
P0154|14|sensor shows no activity|2|1|
P0155|14|sensor heater circuit|2|1|
P0156|14|sensor circuit|2|2|
P0157|14|sensor voltage low|2|2|
P0158|14|sensor voltage high|2|2|
P0159|14|sensor slow to respond|2|2|
P015A|14|sensor delayed rich-to-lean response|1|1|
P015B|14|sensor delayed lean-to-rich response|1|1|
P015C|14|sensor delayed rich-to-lean response|2|1|
P015D|14|sensor delayed lean-to-rich response|2|1|
P0160|14|sensor shows no activity|2|2|
P0161|14|sensor heater circuit|2|2|
P0162|14|sensor circuit|2|3|
P0163|14|sensor voltage low|2|3|
P0164|14|sensor voltage high|2|3|
P0165|14|sensor slow to respond|2|3|
P0166|14|sensor shows no activity|2|3|
P0167|14|sensor heater circuit|2|3|
P0168|7|fuel temperature too high|||
P0169|7|fuel composition incorrect|||
P0170|13|fuel trim fault (unspecified direction)|1||
P0171|13|mixture too lean|1||
P0172|13|mixture too rich|1||
P0173|13|fuel trim fault (unspecified direction)|2||
P0174|13|mixture too lean|2||
P0175|13|mixture too rich|2||
P0176|7|fuel composition sensor circuit|||
P0177|7|fuel composition sensor implausible|||
P0178|7|fuel composition sensor circuit low|||
P0179|7|fuel composition sensor circuit high|||
P0180|7|fuel temperature sensor A circuit|||
P0181|7|fuel temperature sensor A implausible|||
P0182|7|fuel temperature sensor A circuit low|||
P0183|7|fuel temperature sensor A circuit high|||
P0184|7|fuel temperature sensor A intermittent|||
P018A|7|fuel pressure sensor B circuit|||
P018B|7|fuel pressure sensor B implausible|||
P018C|7|fuel pressure sensor B circuit low|||
P018D|7|fuel pressure sensor B circuit high|||
P0190|7|fuel rail pressure sensor A circuit|||
P0191|7|fuel rail pressure sensor A implausible|||
P0192|7|fuel rail pressure sensor A circuit low|||
P0193|7|fuel rail pressure sensor A circuit high|||
P0194|7|fuel rail pressure sensor A intermittent|||
P0200|10|injector circuit (unspecified)|||
P0201|10|injector circuit, open or fault|||1
P0202|10|injector circuit, open or fault|||2
P0203|10|injector circuit, open or fault|||3
P0204|10|injector circuit, open or fault|||4
P0205|10|injector circuit, open or fault|||5
P0206|10|injector circuit, open or fault|||6
P0207|10|injector circuit, open or fault|||7
P0208|10|injector circuit, open or fault|||8
P0209|10|injector circuit, open or fault|||9
P0210|10|injector circuit, open or fault|||10
P0211|10|injector circuit, open or fault|||11
P0212|10|injector circuit, open or fault|||12
P0213|10|cold-start injector 1|||
P0214|10|cold-start injector 2|||
P0217|16|engine coolant overheating|||
P0219|4|engine overspeed|||
P0220|17|throttle/pedal sensor or switch B circuit|||
P0221|17|throttle/pedal sensor or switch B implausible|||
P0222|17|throttle/pedal sensor or switch B circuit low|||
P0223|17|throttle/pedal sensor or switch B circuit high|||
P0224|17|throttle/pedal sensor or switch B intermittent|||
P0225|17|throttle/pedal sensor or switch C circuit|||
P0226|17|throttle/pedal sensor or switch C implausible|||
P0227|17|throttle/pedal sensor or switch C circuit low|||
P0228|17|throttle/pedal sensor or switch C circuit high|||
P0229|17|throttle/pedal sensor or switch C intermittent|||
P0230|7|fuel pump primary (control) circuit|||
P0231|7|fuel pump secondary (power) circuit low|||
P0232|7|fuel pump secondary (power) circuit high|||
P0233|7|fuel pump secondary (power) circuit intermittent|||
P0234|2|boost too high|||
P0235|2|boost sensor A circuit|||
P0236|2|boost sensor A implausible|||
P0237|2|boost sensor A circuit low|||
P0238|2|boost sensor A circuit high|||
P025A|7|fuel pump module control circuit or open|||
P025B|7|fuel pump module control implausible|||
P025C|7|fuel pump module control circuit low|||
P025D|7|fuel pump module control circuit high|||
P0261|10|injector circuit low|||1
P0262|10|injector circuit high|||1
P0263|10|cylinder contribution or balance fault|||1
P0264|10|injector circuit low|||2
P0265|10|injector circuit high|||2
P0266|10|cylinder contribution or balance fault|||2
P0267|10|injector circuit low|||3
P0268|10|injector circuit high|||3
P0269|10|cylinder contribution or balance fault|||3
P0270|10|injector circuit low|||4
P0271|10|injector circuit high|||4
P0272|10|cylinder contribution or balance fault|||4
P0273|10|injector circuit low|||5
P0274|10|injector circuit high|||5
P0275|10|cylinder contribution or balance fault|||5
P0276|10|injector circuit low|||6
P0277|10|injector circuit high|||6
P0278|10|cylinder contribution or balance fault|||6
P0279|10|injector circuit low|||7
P0280|10|injector circuit high|||7
P0281|10|cylinder contribution or balance fault|||7
P0282|10|injector circuit low|||8
P0283|10|injector circuit high|||8
P0284|10|cylinder contribution or balance fault|||8
P0285|10|injector circuit low|||9
P0286|10|injector circuit high|||9
P0287|10|cylinder contribution or balance fault|||9
P0288|10|injector circuit low|||10
P0289|10|injector circuit high|||10
P0290|10|cylinder contribution or balance fault|||10
P0291|10|injector circuit low|||11
P0292|10|injector circuit high|||11
P0293|10|cylinder contribution or balance fault|||11
P0294|10|injector circuit low|||12
P0295|10|injector circuit high|||12
P0296|10|cylinder contribution or balance fault|||12
P0299|2|boost too low|||
P029A|10|cylinder fuel trim at upper limit|||1
P029B|10|cylinder fuel trim at lower limit|||1
P029C|10|injector restricted|||1
P029D|10|injector leaking|||1
P029E|10|cylinder fuel trim at upper limit|||2
P029F|10|cylinder fuel trim at lower limit|||2
P02A0|10|injector restricted|||2
P02A1|10|injector leaking|||2
P02A2|10|cylinder fuel trim at upper limit|||3
P02A3|10|cylinder fuel trim at lower limit|||3
P02A4|10|injector restricted|||3
P02A5|10|injector leaking|||3
P02A6|10|cylinder fuel trim at upper limit|||4
P02A7|10|cylinder fuel trim at lower limit|||4
P02A8|10|injector restricted|||4
P02A9|10|injector leaking|||4
P02AA|10|cylinder fuel trim at upper limit|||5
P02AB|10|cylinder fuel trim at lower limit|||5
P02AC|10|injector restricted|||5
P02AD|10|injector leaking|||5
P02AE|10|cylinder fuel trim at upper limit|||6
P02AF|10|cylinder fuel trim at lower limit|||6
P02B0|10|injector restricted|||6
P02B1|10|injector leaking|||6
P02B2|10|cylinder fuel trim at upper limit|||7
P02B3|10|cylinder fuel trim at lower limit|||7
P02B4|10|injector restricted|||7
P02B5|10|injector leaking|||7
P02B6|10|cylinder fuel trim at upper limit|||8
P02B7|10|cylinder fuel trim at lower limit|||8
P02B8|10|injector restricted|||8
P02B9|10|injector leaking|||8
P0300|12|misfire in more than one cylinder or at random|||
P0301|12|misfire|||1
P0302|12|misfire|||2
P0303|12|misfire|||3
P0304|12|misfire|||4
P0305|12|misfire|||5
P0306|12|misfire|||6
P0307|12|misfire|||7
P0308|12|misfire|||8
P0309|12|misfire|||9
P0310|12|misfire|||10
P0311|12|misfire|||11
P0312|12|misfire|||12
P0313|12|misfire while fuel level is low|||
P0314|12|single-cylinder misfire, cylinder not identified|||
P0315|12|crankshaft variation for misfire detection not learned|||
P0316|12|misfire in the first 1000 revolutions after start|||
P0320|5|ignition/distributor speed input circuit|||
P0321|5|ignition/distributor speed input implausible|||
P0322|5|ignition/distributor speed input: no signal|||
P0323|5|ignition/distributor speed input intermittent|||
P0324|11|knock control system error|||
P0325|11|knock sensor 1 circuit|1||
P0326|11|knock sensor 1 implausible|1||
P0327|11|knock sensor 1 circuit low|1||
P0328|11|knock sensor 1 circuit high|1||
P0329|11|knock sensor 1 intermittent|1||
P0330|11|knock sensor 2 circuit|2||
P0331|11|knock sensor 2 implausible|2||
P0332|11|knock sensor 2 circuit low|2||
P0333|11|knock sensor 2 circuit high|2||
P0334|11|knock sensor 2 intermittent|2||
P0335|5|crankshaft position sensor A circuit|||
P0336|5|crankshaft position sensor A implausible|||
P0337|5|crankshaft position sensor A circuit low|||
P0338|5|crankshaft position sensor A circuit high|||
P0339|5|crankshaft position sensor A intermittent|||
P0340|5|camshaft position sensor A circuit|1||
P0341|5|camshaft position sensor A implausible|1||
P0342|5|camshaft position sensor A circuit low|1||
P0343|5|camshaft position sensor A circuit high|1||
P0344|5|camshaft position sensor A intermittent|1||
P0345|5|camshaft position sensor A circuit|2||
P0346|5|camshaft position sensor A implausible|2||
P0347|5|camshaft position sensor A circuit low|2||
P0348|5|camshaft position sensor A circuit high|2||
P0349|5|camshaft position sensor A intermittent|2||
P0350|9|ignition coil primary/secondary circuit (unspecified)|||
P0351|9|ignition coil A primary/secondary circuit|||
P0352|9|ignition coil B primary/secondary circuit|||
P0353|9|ignition coil C primary/secondary circuit|||
P0354|9|ignition coil D primary/secondary circuit|||
P0355|9|ignition coil E primary/secondary circuit|||
P0356|9|ignition coil F primary/secondary circuit|||
P0357|9|ignition coil G primary/secondary circuit|||
P0358|9|ignition coil H primary/secondary circuit|||
P0359|9|ignition coil I primary/secondary circuit|||
P0360|9|ignition coil J primary/secondary circuit|||
P0361|9|ignition coil K primary/secondary circuit|||
P0362|9|ignition coil L primary/secondary circuit|||
P0363|12|misfire: fuel to a cylinder cut off|||
P0365|5|camshaft position sensor B circuit|1||
P0366|5|camshaft position sensor B implausible|1||
P0367|5|camshaft position sensor B circuit low|1||
P0368|5|camshaft position sensor B circuit high|1||
P0369|5|camshaft position sensor B intermittent|1||
P0385|5|crankshaft position sensor B circuit|||
P0386|5|crankshaft position sensor B implausible|||
P0387|5|crankshaft position sensor B circuit low|||
P0388|5|crankshaft position sensor B circuit high|||
P0389|5|crankshaft position sensor B intermittent|||
P0390|5|camshaft position sensor B circuit|2||
P0391|5|camshaft position sensor B implausible|2||
P0392|5|camshaft position sensor B circuit low|2||
P0393|5|camshaft position sensor B circuit high|2||
P0394|5|camshaft position sensor B intermittent|2||
P0400|0|EGR flow fault|||
P0401|0|EGR flow too low|||
P0402|0|EGR flow too high|||
P0403|0|EGR control circuit|||
P0404|0|EGR control implausible|||
P0405|0|EGR position sensor A circuit low|||
P0406|0|EGR position sensor A circuit high|||
P0407|0|EGR position sensor B circuit low|||
P0408|0|EGR position sensor B circuit high|||
P0409|0|EGR position sensor A circuit|||
P0410|15|secondary air system|||
P0411|15|secondary air flow incorrect|||
P0412|15|secondary air switching valve A circuit|||
P0413|15|secondary air switching valve A circuit open|||
P0414|15|secondary air switching valve A circuit shorted|||
P0418|15|secondary air pump relay A circuit|||
P0420|3|catalyst efficiency below limit|1||
P0421|3|warm-up catalyst efficiency below limit|1||
P0422|3|main catalyst efficiency below limit|1||
P0423|3|heated catalyst efficiency below limit|1||
P0424|3|heated catalyst temperature below limit|1||
P0425|3|catalyst temperature sensor circuit|1|1|
P042E|0|EGR valve control stuck open|||
P042F|0|EGR valve control stuck closed|||
P0430|3|catalyst efficiency below limit|2||
P0431|3|warm-up catalyst efficiency below limit|2||
P0432|3|main catalyst efficiency below limit|2||
P0433|3|heated catalyst efficiency below limit|2||
P0434|3|heated catalyst temperature below limit|2||
P0435|3|catalyst temperature sensor circuit|2|1|
P0440|6|evaporative system fault|||
P0441|6|purge flow incorrect|||
P0442|6|small leak (about 1.0 mm / 0.040 in)|||
P0443|6|purge valve circuit|||
P0444|6|purge valve circuit open|||
P0445|6|purge valve circuit shorted|||
P0446|6|vent control circuit|||
P0447|6|vent control circuit open|||
P0448|6|vent control circuit shorted|||
P0449|6|vent valve/solenoid circuit|||
P0450|6|tank pressure sensor circuit|||
P0451|6|tank pressure sensor implausible|||
P0452|6|tank pressure sensor circuit low|||
P0453|6|tank pressure sensor circuit high|||
P0454|6|tank pressure sensor intermittent|||
P0455|6|gross leak|||
P0456|6|very small leak (about 0.5 mm / 0.020 in)|||
P0457|6|leak: fuel cap loose or off|||
P0458|6|purge valve circuit low|||
P0459|6|purge valve circuit high|||
P0460|6|fuel level sensor circuit|||
P0461|6|fuel level sensor implausible|||
P0462|6|fuel level sensor circuit low|||
P0463|6|fuel level sensor circuit high|||
P0464|6|fuel level sensor intermittent|||
P0489|0|EGR control circuit low|||
P0490|0|EGR control circuit high|||
P0491|15|secondary air flow too low|1||
P0492|15|secondary air flow too low|2||
P0496|6|purge flow when purge is not commanded (valve leaking)|||
P0497|6|purge flow too low|||
P0498|6|vent valve control circuit low|||
P0499|6|vent valve control circuit high|||
P0500|19|vehicle speed sensor A|||
P0501|19|vehicle speed sensor A implausible|||
P0502|19|vehicle speed sensor A circuit low|||
P0503|19|vehicle speed sensor A intermittent, erratic or high|||
P0504|19|brake switches A and B disagree|||
P0505|8|idle speed control fault|||
P0506|8|idle speed lower than target|||
P0507|8|idle speed higher than target|||
P0508|8|idle air control circuit low|||
P0509|8|idle air control circuit high|||
P050A|8|idle control performance on cold start|||
P050B|9|ignition timing performance on cold start|||
P050D|8|rough idle on cold start|||
P0510|8|closed throttle switch|||
P0511|8|idle air control circuit|||
P0519|8|idle air control performance|||
P051B|1|crankcase pressure sensor implausible|||
P052E|1|crankcase ventilation regulator valve performance|||
P0560|4|system voltage fault|||
P0561|4|system voltage unstable|||
P0562|4|system voltage low|||
P0563|4|system voltage high|||
P0600|4|serial link between modules|||
P0601|4|module memory checksum|||
P0602|4|module programming error|||
P0603|4|keep-alive memory|||
P0604|4|random access memory|||
P0605|4|read-only memory|||
P0606|4|processor fault|||
P0607|4|module performance|||
P060B|4|module analogue-to-digital conversion performance|||
P060C|4|module main processor performance|||
P061A|4|module torque monitoring performance|||
P061D|4|module air mass monitoring performance|||
P0627|7|fuel pump A control circuit or open|||
P0628|7|fuel pump A control circuit low|||
P0629|7|fuel pump A control circuit high|||
P062A|7|fuel pump A control implausible|||
P062B|10|module injector control performance|||
P062D|10|injector driver circuit performance|1||
P062E|10|injector driver circuit performance|2||
P0638|17|throttle actuator control implausible|1||
P0641|4|sensor reference voltage A circuit open|||
P0642|4|sensor reference voltage A circuit low|||
P0643|4|sensor reference voltage A circuit high|||
P0650|4|malfunction indicator lamp control circuit|||
P0651|4|sensor reference voltage B circuit open|||
P0652|4|sensor reference voltage B circuit low|||
P0653|4|sensor reference voltage B circuit high|||
P0657|4|actuator supply voltage A circuit or open|||
P0658|4|actuator supply voltage A low|||
P0659|4|actuator supply voltage A high|||
P0685|4|module power relay control circuit open|||
P0686|4|module power relay control circuit low|||
P0687|4|module power relay control circuit high|||
P0697|4|sensor reference voltage C circuit open|||
P0698|4|sensor reference voltage C circuit low|||
P0699|4|sensor reference voltage C circuit high|||
P06D1|9|module ignition coil control performance|||
P2004|1|intake runner control stuck open|1||
P2005|1|intake runner control stuck open|2||
P2006|1|intake runner control stuck closed|1||
P2007|1|intake runner control stuck closed|2||
P2008|1|intake runner control circuit or open|1||
P2014|1|intake runner position sensor circuit|1||
P2015|1|intake runner position sensor implausible|1||
P2016|1|intake runner position sensor circuit low|1||
P2017|1|intake runner position sensor circuit high|1||
P2088|18|intake (A) cam actuator control circuit low|1||
P2089|18|intake (A) cam actuator control circuit high|1||
P2090|18|exhaust (B) cam actuator control circuit low|1||
P2091|18|exhaust (B) cam actuator control circuit high|1||
P2096|13|post-catalyst trim at its lean limit|1||
P2097|13|post-catalyst trim at its rich limit|1||
P2098|13|post-catalyst trim at its lean limit|2||
P2099|13|post-catalyst trim at its rich limit|2||
P2100|17|throttle actuator motor circuit or open|||
P2101|17|throttle actuator motor implausible|||
P2102|17|throttle actuator motor circuit low|||
P2103|17|throttle actuator motor circuit high|||
P2104|17|throttle control: idle forced|||
P2105|17|throttle control: engine shutdown forced|||
P2106|17|throttle control: power limited|||
P2107|17|throttle control module processor|||
P2108|17|throttle control module performance|||
P2110|17|throttle control: engine speed limited|||
P2111|17|throttle stuck open|||
P2112|17|throttle stuck closed|||
P2118|17|throttle actuator motor current implausible|||
P2119|17|throttle body implausible|||
P2120|17|throttle/pedal sensor or switch D circuit|||
P2121|17|throttle/pedal sensor or switch D implausible|||
P2122|17|throttle/pedal sensor or switch D circuit low|||
P2123|17|throttle/pedal sensor or switch D circuit high|||
P2124|17|throttle/pedal sensor or switch D intermittent|||
P2125|17|throttle/pedal sensor or switch E circuit|||
P2126|17|throttle/pedal sensor or switch E implausible|||
P2127|17|throttle/pedal sensor or switch E circuit low|||
P2128|17|throttle/pedal sensor or switch E circuit high|||
P2129|17|throttle/pedal sensor or switch E intermittent|||
P2135|17|throttle/pedal sensors A and B disagree|||
P2138|17|throttle/pedal sensors D and E disagree|||
P2146|10|injector group A supply voltage circuit or open|||
P2147|10|injector group A supply voltage low|||
P2148|10|injector group A supply voltage high|||
P2149|10|injector group B supply voltage circuit or open|||
P2150|10|injector group B supply voltage low|||
P2151|10|injector group B supply voltage high|||
P2172|17|throttle control: sudden high air flow|||
P2173|17|throttle control: high air flow|||
P2174|17|throttle control: sudden low air flow|||
P2175|17|throttle control: low air flow|||
P2176|17|throttle control: idle position not learned|||
P2177|13|mixture too lean off idle|1||
P2178|13|mixture too rich off idle|1||
P2179|13|mixture too lean off idle|2||
P2180|13|mixture too rich off idle|2||
P2181|16|cooling system performance|||
P2187|13|mixture too lean at idle|1||
P2188|13|mixture too rich at idle|1||
P2189|13|mixture too lean at idle|2||
P2190|13|mixture too rich at idle|2||
P2191|13|mixture too lean at higher load|1||
P2192|13|mixture too rich at higher load|1||
P2193|13|mixture too lean at higher load|2||
P2194|13|mixture too rich at higher load|2||
P2195|14|upstream sensor signal biased or stuck lean|1|1|
P2196|14|upstream sensor signal biased or stuck rich|1|1|
P2197|14|upstream sensor signal biased or stuck lean|2|1|
P2198|14|upstream sensor signal biased or stuck rich|2|1|
P219A|13|air/fuel ratio imbalance between cylinders|1||
P219B|13|air/fuel ratio imbalance between cylinders|2||
P219C|13|cylinder air/fuel ratio imbalance|||1
P219D|13|cylinder air/fuel ratio imbalance|||2
P219E|13|cylinder air/fuel ratio imbalance|||3
P219F|13|cylinder air/fuel ratio imbalance|||4
P21A0|13|cylinder air/fuel ratio imbalance|||5
P21A1|13|cylinder air/fuel ratio imbalance|||6
P21A2|13|cylinder air/fuel ratio imbalance|||7
P21A3|13|cylinder air/fuel ratio imbalance|||8
P2226|1|barometric pressure sensor A circuit|||
P2227|1|barometric pressure sensor A implausible|||
P2228|1|barometric pressure sensor A circuit low|||
P2229|1|barometric pressure sensor A circuit high|||
P2231|14|sensor signal circuit shorted to its heater circuit|1|1|
P2232|14|sensor signal circuit shorted to its heater circuit|1|2|
P2234|14|sensor signal circuit shorted to its heater circuit|2|1|
P2235|14|sensor signal circuit shorted to its heater circuit|2|2|
P2237|14|wide-range sensor positive pump current control circuit or open|1|1|
P2240|14|wide-range sensor positive pump current control circuit or open|2|1|
P2243|14|wide-range sensor reference voltage circuit or open|1|1|
P2247|14|wide-range sensor reference voltage circuit or open|2|1|
P2251|14|wide-range sensor negative (common) current control circuit or open|1|1|
P2254|14|wide-range sensor negative (common) current control circuit or open|2|1|
P2263|2|boost system performance|||
P2270|14|downstream sensor signal biased or stuck lean|1|2|
P2271|14|downstream sensor signal biased or stuck rich|1|2|
P2272|14|downstream sensor signal biased or stuck lean|2|2|
P2273|14|downstream sensor signal biased or stuck rich|2|2|
P2279|1|intake air leak (unmetered air)|||
P2282|1|air leak between throttle and intake valves|||
P2293|7|fuel pressure regulator 2 performance|||
P2294|7|fuel pressure regulator 2 control circuit|||
P2295|7|fuel pressure regulator 2 control circuit low|||
P2296|7|fuel pressure regulator 2 control circuit high|||
P2300|9|ignition coil A primary control circuit low|||
P2301|9|ignition coil A primary control circuit high|||
P2302|9|ignition coil A secondary circuit|||
P2303|9|ignition coil B primary control circuit low|||
P2304|9|ignition coil B primary control circuit high|||
P2305|9|ignition coil B secondary circuit|||
P2306|9|ignition coil C primary control circuit low|||
P2307|9|ignition coil C primary control circuit high|||
P2308|9|ignition coil C secondary circuit|||
P2309|9|ignition coil D primary control circuit low|||
P2310|9|ignition coil D primary control circuit high|||
P2311|9|ignition coil D secondary circuit|||
P2312|9|ignition coil E primary control circuit low|||
P2313|9|ignition coil E primary control circuit high|||
P2314|9|ignition coil E secondary circuit|||
P2315|9|ignition coil F primary control circuit low|||
P2316|9|ignition coil F primary control circuit high|||
P2317|9|ignition coil F secondary circuit|||
P2318|9|ignition coil G primary control circuit low|||
P2319|9|ignition coil G primary control circuit high|||
P2320|9|ignition coil G secondary circuit|||
P2321|9|ignition coil H primary control circuit low|||
P2322|9|ignition coil H primary control circuit high|||
P2323|9|ignition coil H secondary circuit|||
P2336|11|knock above limit|||1
P2337|11|knock above limit|||2
P2338|11|knock above limit|||3
P2339|11|knock above limit|||4
P2340|11|knock above limit|||5
P2341|11|knock above limit|||6
P2342|11|knock above limit|||7
P2343|11|knock above limit|||8
P2400|6|leak-check pump control circuit or open|||
P2401|6|leak-check pump control circuit low|||
P2402|6|leak-check pump control circuit high|||
P2413|0|EGR system performance|||
P2422|6|vent valve stuck closed|||
P2539|7|low-pressure fuel sensor circuit|||
P2540|7|low-pressure fuel sensor implausible|||
P2610|4|module engine-off timer performance|||
P2626|14|wide-range sensor pump current trim circuit or open|1|1|
P2629|14|wide-range sensor pump current trim circuit or open|2|1|
P2635|7|fuel pump A low flow or performance|||
P2A00|14|sensor range or performance|1|1|
P2A01|14|sensor range or performance|1|2|
P2A02|14|sensor range or performance|1|3|
P2A03|14|sensor range or performance|2|1|
P2A04|14|sensor range or performance|2|2|
P3400|1|cylinder deactivation system|1||
P3497|1|cylinder deactivation system|2||
U0100|4|no communication with the engine/powertrain module A|||
U0101|4|no communication with the transmission module|||
U0121|4|no communication with the anti-lock brake module|||
`;
