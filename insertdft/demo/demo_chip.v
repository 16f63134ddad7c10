// Demo chip of insertdft: the controller of an invented tide station, as gates of the invented
// library demo.lib. Made from testdata/demo/tide_station.v by Yosys; see tools/make_demo.py.

module gauge_channel(clk, probe_clk, rst_n, probe, calibrate, calibration, level, fresh, high);
  input clk;
  wire clk;
  input probe_clk;
  wire probe_clk;
  input rst_n;
  wire rst_n;
  input probe;
  wire probe;
  input calibrate;
  wire calibrate;
  input [3:0] calibration;
  wire [3:0] calibration;
  output [11:0] level;
  wire [11:0] level;
  output fresh;
  wire fresh;
  output high;
  wire high;
  wire _000_;
  wire [3:0] _001_;
  wire _002_;
  wire _003_;
  wire _004_;
  wire _005_;
  wire _006_;
  wire _007_;
  wire _008_;
  wire _009_;
  wire _010_;
  wire _011_;
  wire _012_;
  wire _013_;
  wire _014_;
  wire _015_;
  wire _016_;
  wire _017_;
  wire _018_;
  wire _019_;
  wire _020_;
  wire _021_;
  wire _022_;
  wire _023_;
  wire _024_;
  wire _025_;
  wire _026_;
  wire _027_;
  wire _028_;
  wire _029_;
  wire _030_;
  wire _031_;
  wire _032_;
  wire _033_;
  wire _034_;
  wire _035_;
  wire _036_;
  wire _037_;
  wire _038_;
  wire _039_;
  wire _040_;
  wire _041_;
  wire _042_;
  wire _043_;
  wire _044_;
  wire _045_;
  wire _046_;
  wire _047_;
  wire _048_;
  wire _049_;
  wire _050_;
  wire _051_;
  wire _052_;
  wire _053_;
  wire _054_;
  wire _055_;
  wire _056_;
  wire _057_;
  wire _058_;
  wire _059_;
  wire _060_;
  wire _061_;
  wire _062_;
  wire _063_;
  wire _064_;
  wire _065_;
  wire _066_;
  wire _067_;
  wire _068_;
  wire _069_;
  wire _070_;
  wire _071_;
  wire _072_;
  wire _073_;
  wire _074_;
  wire _075_;
  wire _076_;
  wire _077_;
  wire _078_;
  wire _079_;
  wire _080_;
  wire _081_;
  wire _082_;
  wire _083_;
  wire _084_;
  wire _085_;
  wire _086_;
  wire _087_;
  wire _088_;
  wire _089_;
  wire _090_;
  wire _091_;
  wire _092_;
  wire _093_;
  wire _094_;
  wire _095_;
  wire _096_;
  wire _097_;
  wire _098_;
  wire _099_;
  wire _100_;
  wire _101_;
  wire _102_;
  wire _103_;
  wire _104_;
  wire _105_;
  wire _106_;
  wire _107_;
  wire _108_;
  wire _109_;
  wire _110_;
  wire _111_;
  wire _112_;
  wire _113_;
  wire _114_;
  wire _115_;
  wire _116_;
  wire _117_;
  wire _118_;
  wire _119_;
  wire _120_;
  wire _121_;
  wire _122_;
  wire _123_;
  wire _124_;
  wire _125_;
  wire _126_;
  wire _127_;
  wire _128_;
  wire _129_;
  wire _130_;
  wire _131_;
  wire _132_;
  wire _133_;
  wire _134_;
  wire _135_;
  wire _136_;
  wire _137_;
  wire _138_;
  wire _139_;
  wire _140_;
  wire _141_;
  wire _142_;
  wire _143_;
  wire _144_;
  wire _145_;
  wire _146_;
  wire _147_;
  wire _148_;
  wire _149_;
  wire _150_;
  wire _151_;
  wire _152_;
  wire _153_;
  wire _154_;
  wire _155_;
  wire _156_;
  wire _157_;
  wire _158_;
  wire _159_;
  wire _160_;
  wire _161_;
  wire _162_;
  wire _163_;
  wire _164_;
  wire _165_;
  wire _166_;
  wire _167_;
  wire _168_;
  wire _169_;
  wire _170_;
  wire _171_;
  wire _172_;
  wire _173_;
  wire _174_;
  wire _175_;
  wire _176_;
  wire _177_;
  wire _178_;
  wire _179_;
  wire _180_;
  wire _181_;
  wire _182_;
  wire _183_;
  wire _184_;
  wire _185_;
  wire _186_;
  wire _187_;
  wire _188_;
  wire _189_;
  wire _190_;
  wire _191_;
  wire _192_;
  wire _193_;
  wire _194_;
  wire _195_;
  wire _196_;
  wire _197_;
  wire _198_;
  wire _199_;
  wire _200_;
  wire _201_;
  wire _202_;
  wire _203_;
  wire _204_;
  wire _205_;
  wire _206_;
  wire _207_;
  wire _208_;
  wire _209_;
  wire _210_;
  wire _211_;
  wire _212_;
  wire _213_;
  wire _214_;
  wire _215_;
  wire _216_;
  wire _217_;
  wire _218_;
  wire _219_;
  wire _220_;
  wire _221_;
  wire _222_;
  wire _223_;
  wire _224_;
  wire _225_;
  wire _226_;
  wire _227_;
  wire _228_;
  wire _229_;
  wire _230_;
  wire _231_;
  wire _232_;
  wire _233_;
  wire _234_;
  wire _235_;
  wire _236_;
  wire _237_;
  wire _238_;
  wire _239_;
  wire _240_;
  wire _241_;
  wire _242_;
  wire _243_;
  wire [11:0] _244_;
  wire [11:0] _245_;
  wire [11:0] _246_;
  wire [3:0] bits;
  wire [9:0] \held[0] ;
  wire [9:0] \held[1] ;
  wire [9:0] \held[2] ;
  wire [9:0] \held[3] ;
  wire [3:0] offset;
  wire ready;
  wire sampled;
  wire [2:0] seen;
  wire take;
  wire [9:0] word;
  inv_w1 _247_ (
    .A(level[6]),
    .Y(_167_)
  );
  inv_w1 _248_ (
    .A(\held[3] [0]),
    .Y(_168_)
  );
  and4_w1 _249_ (
    .A(level[9]),
    .B(level[7]),
    .C(level[8]),
    .D(_009_),
    .Y(_010_)
  );
  inv_w1 _250_ (
    .A(_094_),
    .Y(_095_)
  );
  and2_w1 _251_ (
    .A(offset[1]),
    .B(\held[0] [1]),
    .Y(_096_)
  );
  xor2_w1 _252_ (
    .A(offset[1]),
    .B(\held[0] [1]),
    .Y(_097_)
  );
  and_nor21_w1 _253_ (
    .A(\held[1] [1]),
    .B(_097_),
    .C(_096_),
    .Y(_098_)
  );
  xnor2_w1 _254_ (
    .A(\held[1] [2]),
    .B(_084_),
    .Y(_099_)
  );
  nor2_w1 _255_ (
    .A(_098_),
    .B(_099_),
    .Y(_100_)
  );
  xor2_w1 _256_ (
    .A(_098_),
    .B(_099_),
    .Y(_101_)
  );
  and_nor21_w1 _257_ (
    .A(\held[2] [2]),
    .B(_101_),
    .C(_100_),
    .Y(_102_)
  );
  xnor2_w1 _258_ (
    .A(\held[2] [3]),
    .B(_089_),
    .Y(_103_)
  );
  nor2_w1 _259_ (
    .A(_102_),
    .B(_103_),
    .Y(_104_)
  );
  or_nand21_w1 _260_ (
    .A(level[10]),
    .B(_010_),
    .C(level[11]),
    .Y(_011_)
  );
  xor2_w1 _261_ (
    .A(_102_),
    .B(_103_),
    .Y(_105_)
  );
  and_nor21_w1 _262_ (
    .A(\held[3] [3]),
    .B(_105_),
    .C(_104_),
    .Y(_106_)
  );
  xor2_w1 _263_ (
    .A(_090_),
    .B(_091_),
    .Y(_107_)
  );
  inv_w1 _264_ (
    .A(_107_),
    .Y(_108_)
  );
  nor2_w1 _265_ (
    .A(_106_),
    .B(_108_),
    .Y(_109_)
  );
  inv_w1 _266_ (
    .A(_109_),
    .Y(_110_)
  );
  and_nor21_w1 _267_ (
    .A(\held[1] [0]),
    .B(_013_),
    .C(_012_),
    .Y(_111_)
  );
  xnor2_w1 _268_ (
    .A(\held[1] [1]),
    .B(_097_),
    .Y(_112_)
  );
  nor2_w1 _269_ (
    .A(_111_),
    .B(_112_),
    .Y(_113_)
  );
  xor2_w1 _270_ (
    .A(_111_),
    .B(_112_),
    .Y(_114_)
  );
  inv_w1 _271_ (
    .A(_011_),
    .Y(_000_)
  );
  and_nor21_w1 _272_ (
    .A(\held[2] [1]),
    .B(_114_),
    .C(_113_),
    .Y(_115_)
  );
  xnor2_w1 _273_ (
    .A(\held[2] [2]),
    .B(_101_),
    .Y(_116_)
  );
  nor2_w1 _274_ (
    .A(_115_),
    .B(_116_),
    .Y(_117_)
  );
  xor2_w1 _275_ (
    .A(_115_),
    .B(_116_),
    .Y(_118_)
  );
  and_nor21_w1 _276_ (
    .A(\held[3] [2]),
    .B(_118_),
    .C(_117_),
    .Y(_119_)
  );
  xnor2_w1 _277_ (
    .A(\held[3] [3]),
    .B(_105_),
    .Y(_120_)
  );
  nor2_w1 _278_ (
    .A(_119_),
    .B(_120_),
    .Y(_121_)
  );
  xnor2_w1 _279_ (
    .A(\held[2] [1]),
    .B(_114_),
    .Y(_122_)
  );
  nor2_w1 _280_ (
    .A(_016_),
    .B(_122_),
    .Y(_123_)
  );
  xor2_w1 _281_ (
    .A(_016_),
    .B(_122_),
    .Y(_124_)
  );
  and2_w1 _282_ (
    .A(offset[0]),
    .B(\held[0] [0]),
    .Y(_012_)
  );
  and_nor21_w1 _283_ (
    .A(\held[3] [1]),
    .B(_124_),
    .C(_123_),
    .Y(_125_)
  );
  xnor2_w1 _284_ (
    .A(\held[3] [2]),
    .B(_118_),
    .Y(_126_)
  );
  nor2_w1 _285_ (
    .A(_125_),
    .B(_126_),
    .Y(_127_)
  );
  xnor2_w1 _286_ (
    .A(\held[3] [1]),
    .B(_124_),
    .Y(_128_)
  );
  nor3_w1 _287_ (
    .A(_168_),
    .B(_017_),
    .C(_128_),
    .Y(_129_)
  );
  xor2_w1 _288_ (
    .A(_125_),
    .B(_126_),
    .Y(_130_)
  );
  and_nor21_w1 _289_ (
    .A(_129_),
    .B(_130_),
    .C(_127_),
    .Y(_131_)
  );
  xnor2_w1 _290_ (
    .A(_119_),
    .B(_120_),
    .Y(_132_)
  );
  nor2_w1 _291_ (
    .A(_131_),
    .B(_132_),
    .Y(_133_)
  );
  nor2_w1 _292_ (
    .A(_121_),
    .B(_133_),
    .Y(_134_)
  );
  xor2_w1 _293_ (
    .A(offset[0]),
    .B(\held[0] [0]),
    .Y(_013_)
  );
  xnor2_w1 _294_ (
    .A(_106_),
    .B(_107_),
    .Y(_135_)
  );
  or_nand21_w1 _295_ (
    .A(_121_),
    .B(_133_),
    .C(_135_),
    .Y(_136_)
  );
  and2_w1 _296_ (
    .A(_110_),
    .B(_136_),
    .Y(_137_)
  );
  xnor2_w1 _297_ (
    .A(_092_),
    .B(_093_),
    .Y(_138_)
  );
  and_nor21_w1 _298_ (
    .A(_110_),
    .B(_136_),
    .C(_138_),
    .Y(_139_)
  );
  nor2_w1 _299_ (
    .A(_095_),
    .B(_139_),
    .Y(_140_)
  );
  xnor2_w1 _300_ (
    .A(_080_),
    .B(_081_),
    .Y(_141_)
  );
  inv_w1 _301_ (
    .A(_141_),
    .Y(_142_)
  );
  or_nand21_w1 _302_ (
    .A(_095_),
    .B(_139_),
    .C(_142_),
    .Y(_143_)
  );
  xnor2_w1 _303_ (
    .A(_068_),
    .B(_069_),
    .Y(_144_)
  );
  xnor2_w1 _304_ (
    .A(\held[1] [0]),
    .B(_013_),
    .Y(_014_)
  );
  and_nor21_w1 _305_ (
    .A(_082_),
    .B(_143_),
    .C(_144_),
    .Y(_145_)
  );
  xnor2_w1 _306_ (
    .A(_057_),
    .B(_058_),
    .Y(_146_)
  );
  inv_w1 _307_ (
    .A(_146_),
    .Y(_147_)
  );
  or_nand21_w1 _308_ (
    .A(_071_),
    .B(_145_),
    .C(_147_),
    .Y(_148_)
  );
  xnor2_w1 _309_ (
    .A(_036_),
    .B(_047_),
    .Y(_149_)
  );
  and_nor21_w1 _310_ (
    .A(_059_),
    .B(_148_),
    .C(_149_),
    .Y(_150_)
  );
  and_nor21_w1 _311_ (
    .A(\held[2] [9]),
    .B(_039_),
    .C(_038_),
    .Y(_151_)
  );
  and_nor21_w1 _312_ (
    .A(\held[3] [9]),
    .B(_043_),
    .C(_041_),
    .Y(_152_)
  );
  or2_w1 _313_ (
    .A(_151_),
    .B(_152_),
    .Y(_153_)
  );
  xnor2_w1 _314_ (
    .A(_151_),
    .B(_152_),
    .Y(_154_)
  );
  inv_w1 _315_ (
    .A(_014_),
    .Y(_015_)
  );
  xnor2_w1 _316_ (
    .A(_045_),
    .B(_154_),
    .Y(_155_)
  );
  or_nand21_w1 _317_ (
    .A(_048_),
    .B(_150_),
    .C(_155_),
    .Y(_156_)
  );
  or3_w1 _318_ (
    .A(_048_),
    .B(_150_),
    .C(_155_),
    .Y(_157_)
  );
  and2_w1 _319_ (
    .A(_156_),
    .B(_157_),
    .Y(_246_[10])
  );
  and3_w1 _320_ (
    .A(_059_),
    .B(_148_),
    .C(_149_),
    .Y(_158_)
  );
  nor2_w1 _321_ (
    .A(_150_),
    .B(_158_),
    .Y(_246_[9])
  );
  or3_w1 _322_ (
    .A(_071_),
    .B(_145_),
    .C(_147_),
    .Y(_159_)
  );
  and2_w1 _323_ (
    .A(_148_),
    .B(_159_),
    .Y(_246_[8])
  );
  and3_w1 _324_ (
    .A(_082_),
    .B(_143_),
    .C(_144_),
    .Y(_160_)
  );
  nor2_w1 _325_ (
    .A(_145_),
    .B(_160_),
    .Y(_246_[7])
  );
  nand2_w1 _326_ (
    .A(\held[2] [0]),
    .B(_015_),
    .Y(_016_)
  );
  xnor2_w1 _327_ (
    .A(_140_),
    .B(_142_),
    .Y(_246_[6])
  );
  xor2_w1 _328_ (
    .A(_137_),
    .B(_138_),
    .Y(_246_[5])
  );
  xnor2_w1 _329_ (
    .A(_134_),
    .B(_135_),
    .Y(_246_[4])
  );
  xor2_w1 _330_ (
    .A(_131_),
    .B(_132_),
    .Y(_246_[3])
  );
  xor2_w1 _331_ (
    .A(_129_),
    .B(_130_),
    .Y(_246_[2])
  );
  xnor2_w1 _332_ (
    .A(_018_),
    .B(_128_),
    .Y(_245_[1])
  );
  or_nand21_w1 _333_ (
    .A(_046_),
    .B(_154_),
    .C(_153_),
    .Y(_161_)
  );
  mux2_w1 _334_ (
    .A(_153_),
    .B(_161_),
    .S(_156_),
    .Y(_246_[11])
  );
  nand2_w1 _335_ (
    .A(bits[1]),
    .B(bits[0]),
    .Y(_162_)
  );
  and3_w1 _336_ (
    .A(bits[1]),
    .B(bits[2]),
    .C(bits[0]),
    .Y(_163_)
  );
  xor2_w1 _337_ (
    .A(\held[2] [0]),
    .B(_014_),
    .Y(_017_)
  );
  xnor2_w1 _338_ (
    .A(bits[2]),
    .B(_162_),
    .Y(_001_[2])
  );
  nor2_w1 _339_ (
    .A(bits[1]),
    .B(bits[0]),
    .Y(_164_)
  );
  or_nand21_w1 _340_ (
    .A(bits[2]),
    .B(_169_),
    .C(_162_),
    .Y(_165_)
  );
  nor2_w1 _341_ (
    .A(_164_),
    .B(_165_),
    .Y(_001_[1])
  );
  or_nand22_w1 _342_ (
    .A(bits[3]),
    .B(_163_),
    .C(_001_[2]),
    .D(_169_),
    .Y(_166_)
  );
  inv_w1 _343_ (
    .A(_166_),
    .Y(_001_[3])
  );
  nor2_w1 _344_ (
    .A(_168_),
    .B(_017_),
    .Y(_018_)
  );
  xor2_w1 _345_ (
    .A(seen[2]),
    .B(seen[1]),
    .Y(take)
  );
  xnor2_w1 _346_ (
    .A(\held[3] [0]),
    .B(_017_),
    .Y(_244_[0])
  );
  mux2_w1 _347_ (
    .A(offset[0]),
    .B(calibration[0]),
    .S(calibrate),
    .Y(_003_)
  );
  mux2_w1 _348_ (
    .A(offset[2]),
    .B(calibration[2]),
    .S(calibrate),
    .Y(_005_)
  );
  mux2_w1 _349_ (
    .A(offset[1]),
    .B(calibration[1]),
    .S(calibrate),
    .Y(_004_)
  );
  and2_w1 _350_ (
    .A(\held[0] [6]),
    .B(\held[1] [6]),
    .Y(_019_)
  );
  xor2_w1 _351_ (
    .A(\held[0] [6]),
    .B(\held[1] [6]),
    .Y(_020_)
  );
  and_nor21_w1 _352_ (
    .A(\held[2] [6]),
    .B(_020_),
    .C(_019_),
    .Y(_021_)
  );
  and2_w1 _353_ (
    .A(\held[0] [7]),
    .B(\held[1] [7]),
    .Y(_022_)
  );
  xor2_w1 _354_ (
    .A(\held[0] [7]),
    .B(\held[1] [7]),
    .Y(_023_)
  );
  xnor2_w1 _355_ (
    .A(\held[2] [7]),
    .B(_023_),
    .Y(_024_)
  );
  nand2_w1 _356_ (
    .A(bits[3]),
    .B(bits[0]),
    .Y(_169_)
  );
  nor2_w1 _357_ (
    .A(_021_),
    .B(_024_),
    .Y(_025_)
  );
  xor2_w1 _358_ (
    .A(_021_),
    .B(_024_),
    .Y(_026_)
  );
  and_nor21_w1 _359_ (
    .A(\held[3] [7]),
    .B(_026_),
    .C(_025_),
    .Y(_027_)
  );
  and_nor21_w1 _360_ (
    .A(\held[2] [7]),
    .B(_023_),
    .C(_022_),
    .Y(_028_)
  );
  nand2_w1 _361_ (
    .A(\held[0] [8]),
    .B(\held[1] [8]),
    .Y(_029_)
  );
  xor2_w1 _362_ (
    .A(\held[0] [8]),
    .B(\held[1] [8]),
    .Y(_030_)
  );
  nand2_w1 _363_ (
    .A(\held[2] [8]),
    .B(_030_),
    .Y(_031_)
  );
  xnor2_w1 _364_ (
    .A(\held[2] [8]),
    .B(_030_),
    .Y(_032_)
  );
  nor2_w1 _365_ (
    .A(_028_),
    .B(_032_),
    .Y(_033_)
  );
  xor2_w1 _366_ (
    .A(_028_),
    .B(_032_),
    .Y(_034_)
  );
  nor3_w1 _367_ (
    .A(bits[1]),
    .B(bits[2]),
    .C(_169_),
    .Y(_170_)
  );
  xnor2_w1 _368_ (
    .A(\held[3] [8]),
    .B(_034_),
    .Y(_035_)
  );
  nor2_w1 _369_ (
    .A(_027_),
    .B(_035_),
    .Y(_036_)
  );
  and_nor21_w1 _370_ (
    .A(\held[3] [8]),
    .B(_034_),
    .C(_033_),
    .Y(_037_)
  );
  and2_w1 _371_ (
    .A(\held[0] [9]),
    .B(\held[1] [9]),
    .Y(_038_)
  );
  xor2_w1 _372_ (
    .A(\held[0] [9]),
    .B(\held[1] [9]),
    .Y(_039_)
  );
  xnor2_w1 _373_ (
    .A(\held[2] [9]),
    .B(_039_),
    .Y(_040_)
  );
  and_nor21_w1 _374_ (
    .A(_029_),
    .B(_031_),
    .C(_040_),
    .Y(_041_)
  );
  and3_w1 _375_ (
    .A(_029_),
    .B(_031_),
    .C(_040_),
    .Y(_042_)
  );
  nor2_w1 _376_ (
    .A(_041_),
    .B(_042_),
    .Y(_043_)
  );
  xnor2_w1 _377_ (
    .A(\held[3] [9]),
    .B(_043_),
    .Y(_044_)
  );
  mux2_w1 _378_ (
    .A(ready),
    .B(_002_),
    .S(_170_),
    .Y(_007_)
  );
  nor2_w1 _379_ (
    .A(_037_),
    .B(_044_),
    .Y(_045_)
  );
  inv_w1 _380_ (
    .A(_045_),
    .Y(_046_)
  );
  xor2_w1 _381_ (
    .A(_037_),
    .B(_044_),
    .Y(_047_)
  );
  and2_w1 _382_ (
    .A(_036_),
    .B(_047_),
    .Y(_048_)
  );
  and2_w1 _383_ (
    .A(\held[0] [5]),
    .B(\held[1] [5]),
    .Y(_049_)
  );
  xor2_w1 _384_ (
    .A(\held[0] [5]),
    .B(\held[1] [5]),
    .Y(_050_)
  );
  and_nor21_w1 _385_ (
    .A(\held[2] [5]),
    .B(_050_),
    .C(_049_),
    .Y(_051_)
  );
  xnor2_w1 _386_ (
    .A(\held[2] [6]),
    .B(_020_),
    .Y(_052_)
  );
  nor2_w1 _387_ (
    .A(_051_),
    .B(_052_),
    .Y(_053_)
  );
  xor2_w1 _388_ (
    .A(_051_),
    .B(_052_),
    .Y(_054_)
  );
  mux2_w1 _389_ (
    .A(offset[3]),
    .B(calibration[3]),
    .S(calibrate),
    .Y(_006_)
  );
  and_nor21_w1 _390_ (
    .A(\held[3] [6]),
    .B(_054_),
    .C(_053_),
    .Y(_055_)
  );
  xnor2_w1 _391_ (
    .A(\held[3] [7]),
    .B(_026_),
    .Y(_056_)
  );
  nor2_w1 _392_ (
    .A(_055_),
    .B(_056_),
    .Y(_057_)
  );
  xor2_w1 _393_ (
    .A(_027_),
    .B(_035_),
    .Y(_058_)
  );
  nand2_w1 _394_ (
    .A(_057_),
    .B(_058_),
    .Y(_059_)
  );
  and2_w1 _395_ (
    .A(\held[0] [4]),
    .B(\held[1] [4]),
    .Y(_060_)
  );
  xor2_w1 _396_ (
    .A(\held[0] [4]),
    .B(\held[1] [4]),
    .Y(_061_)
  );
  and_nor21_w1 _397_ (
    .A(\held[2] [4]),
    .B(_061_),
    .C(_060_),
    .Y(_062_)
  );
  xnor2_w1 _398_ (
    .A(\held[2] [5]),
    .B(_050_),
    .Y(_063_)
  );
  nor2_w1 _399_ (
    .A(_062_),
    .B(_063_),
    .Y(_064_)
  );
  nor3_w1 _400_ (
    .A(level[0]),
    .B(level[1]),
    .C(level[2]),
    .Y(_171_)
  );
  xor2_w1 _401_ (
    .A(_062_),
    .B(_063_),
    .Y(_065_)
  );
  and_nor21_w1 _402_ (
    .A(\held[3] [5]),
    .B(_065_),
    .C(_064_),
    .Y(_066_)
  );
  xnor2_w1 _403_ (
    .A(\held[3] [6]),
    .B(_054_),
    .Y(_067_)
  );
  nor2_w1 _404_ (
    .A(_066_),
    .B(_067_),
    .Y(_068_)
  );
  xor2_w1 _405_ (
    .A(_055_),
    .B(_056_),
    .Y(_069_)
  );
  nand2_w1 _406_ (
    .A(_068_),
    .B(_069_),
    .Y(_070_)
  );
  inv_w1 _407_ (
    .A(_070_),
    .Y(_071_)
  );
  and2_w1 _408_ (
    .A(offset[3]),
    .B(\held[0] [3]),
    .Y(_072_)
  );
  xor2_w1 _409_ (
    .A(offset[3]),
    .B(\held[0] [3]),
    .Y(_073_)
  );
  and_nor21_w1 _410_ (
    .A(\held[1] [3]),
    .B(_073_),
    .C(_072_),
    .Y(_074_)
  );
  nand3_w1 _411_ (
    .A(level[5]),
    .B(level[3]),
    .C(level[4]),
    .Y(_008_)
  );
  xnor2_w1 _412_ (
    .A(\held[2] [4]),
    .B(_061_),
    .Y(_075_)
  );
  nor2_w1 _413_ (
    .A(_074_),
    .B(_075_),
    .Y(_076_)
  );
  xor2_w1 _414_ (
    .A(_074_),
    .B(_075_),
    .Y(_077_)
  );
  and_nor21_w1 _415_ (
    .A(\held[3] [4]),
    .B(_077_),
    .C(_076_),
    .Y(_078_)
  );
  xnor2_w1 _416_ (
    .A(\held[3] [5]),
    .B(_065_),
    .Y(_079_)
  );
  nor2_w1 _417_ (
    .A(_078_),
    .B(_079_),
    .Y(_080_)
  );
  xor2_w1 _418_ (
    .A(_066_),
    .B(_067_),
    .Y(_081_)
  );
  nand2_w1 _419_ (
    .A(_080_),
    .B(_081_),
    .Y(_082_)
  );
  nand2_w1 _420_ (
    .A(offset[2]),
    .B(\held[0] [2]),
    .Y(_083_)
  );
  xor2_w1 _421_ (
    .A(offset[2]),
    .B(\held[0] [2]),
    .Y(_084_)
  );
  or_nand21_w1 _422_ (
    .A(_171_),
    .B(_008_),
    .C(_167_),
    .Y(_009_)
  );
  nand2_w1 _423_ (
    .A(\held[1] [2]),
    .B(_084_),
    .Y(_085_)
  );
  xnor2_w1 _424_ (
    .A(\held[1] [3]),
    .B(_073_),
    .Y(_086_)
  );
  and_nor21_w1 _425_ (
    .A(_083_),
    .B(_085_),
    .C(_086_),
    .Y(_087_)
  );
  and3_w1 _426_ (
    .A(_083_),
    .B(_085_),
    .C(_086_),
    .Y(_088_)
  );
  nor2_w1 _427_ (
    .A(_087_),
    .B(_088_),
    .Y(_089_)
  );
  and_nor21_w1 _428_ (
    .A(\held[2] [3]),
    .B(_089_),
    .C(_087_),
    .Y(_090_)
  );
  xnor2_w1 _429_ (
    .A(\held[3] [4]),
    .B(_077_),
    .Y(_091_)
  );
  nor2_w1 _430_ (
    .A(_090_),
    .B(_091_),
    .Y(_092_)
  );
  xor2_w1 _431_ (
    .A(_078_),
    .B(_079_),
    .Y(_093_)
  );
  nand2_w1 _432_ (
    .A(_092_),
    .B(_093_),
    .Y(_094_)
  );
  flop_r_w1 _433_ (
    .CK(probe_clk),
    .D(_007_),
    .Q(ready),
    .QN(_002_),
    .RN(rst_n)
  );
  flop_e_w1 _434_ (
    .CK(clk),
    .D(\held[2] [0]),
    .E(take),
    .Q(\held[3] [0]),
    .QN(_173_)
  );
  flop_e_w1 _435_ (
    .CK(clk),
    .D(\held[2] [1]),
    .E(take),
    .Q(\held[3] [1]),
    .QN(_232_)
  );
  flop_e_w1 _436_ (
    .CK(clk),
    .D(\held[2] [2]),
    .E(take),
    .Q(\held[3] [2]),
    .QN(_231_)
  );
  flop_e_w1 _437_ (
    .CK(clk),
    .D(\held[2] [3]),
    .E(take),
    .Q(\held[3] [3]),
    .QN(_230_)
  );
  flop_e_w1 _438_ (
    .CK(clk),
    .D(\held[2] [4]),
    .E(take),
    .Q(\held[3] [4]),
    .QN(_229_)
  );
  flop_e_w1 _439_ (
    .CK(clk),
    .D(\held[2] [5]),
    .E(take),
    .Q(\held[3] [5]),
    .QN(_228_)
  );
  flop_e_w1 _440_ (
    .CK(clk),
    .D(\held[2] [6]),
    .E(take),
    .Q(\held[3] [6]),
    .QN(_227_)
  );
  flop_e_w1 _441_ (
    .CK(clk),
    .D(\held[2] [7]),
    .E(take),
    .Q(\held[3] [7]),
    .QN(_226_)
  );
  flop_e_w1 _442_ (
    .CK(clk),
    .D(\held[2] [8]),
    .E(take),
    .Q(\held[3] [8]),
    .QN(_225_)
  );
  flop_e_w1 _443_ (
    .CK(clk),
    .D(\held[2] [9]),
    .E(take),
    .Q(\held[3] [9]),
    .QN(_233_)
  );
  flop_e_w1 _444_ (
    .CK(clk),
    .D(word[0]),
    .E(take),
    .Q(\held[0] [0]),
    .QN(_224_)
  );
  flop_e_w1 _445_ (
    .CK(clk),
    .D(word[1]),
    .E(take),
    .Q(\held[0] [1]),
    .QN(_223_)
  );
  flop_e_w1 _446_ (
    .CK(clk),
    .D(word[2]),
    .E(take),
    .Q(\held[0] [2]),
    .QN(_222_)
  );
  flop_e_w1 _447_ (
    .CK(clk),
    .D(word[3]),
    .E(take),
    .Q(\held[0] [3]),
    .QN(_221_)
  );
  flop_e_w1 _448_ (
    .CK(clk),
    .D(word[4]),
    .E(take),
    .Q(\held[0] [4]),
    .QN(_220_)
  );
  flop_e_w1 _449_ (
    .CK(clk),
    .D(word[5]),
    .E(take),
    .Q(\held[0] [5]),
    .QN(_219_)
  );
  flop_e_w1 _450_ (
    .CK(clk),
    .D(word[6]),
    .E(take),
    .Q(\held[0] [6]),
    .QN(_218_)
  );
  flop_e_w1 _451_ (
    .CK(clk),
    .D(word[7]),
    .E(take),
    .Q(\held[0] [7]),
    .QN(_217_)
  );
  flop_e_w1 _452_ (
    .CK(clk),
    .D(word[8]),
    .E(take),
    .Q(\held[0] [8]),
    .QN(_216_)
  );
  flop_e_w1 _453_ (
    .CK(clk),
    .D(word[9]),
    .E(take),
    .Q(\held[0] [9]),
    .QN(_239_)
  );
  flop_e_w1 _454_ (
    .CK(clk),
    .D(\held[0] [0]),
    .E(take),
    .Q(\held[1] [0]),
    .QN(_215_)
  );
  flop_e_w1 _455_ (
    .CK(clk),
    .D(\held[0] [1]),
    .E(take),
    .Q(\held[1] [1]),
    .QN(_214_)
  );
  flop_e_w1 _456_ (
    .CK(clk),
    .D(\held[0] [2]),
    .E(take),
    .Q(\held[1] [2]),
    .QN(_213_)
  );
  flop_e_w1 _457_ (
    .CK(clk),
    .D(\held[0] [3]),
    .E(take),
    .Q(\held[1] [3]),
    .QN(_212_)
  );
  flop_e_w1 _458_ (
    .CK(clk),
    .D(\held[0] [4]),
    .E(take),
    .Q(\held[1] [4]),
    .QN(_211_)
  );
  flop_e_w1 _459_ (
    .CK(clk),
    .D(\held[0] [5]),
    .E(take),
    .Q(\held[1] [5]),
    .QN(_210_)
  );
  flop_e_w1 _460_ (
    .CK(clk),
    .D(\held[0] [6]),
    .E(take),
    .Q(\held[1] [6]),
    .QN(_209_)
  );
  flop_e_w1 _461_ (
    .CK(clk),
    .D(\held[0] [7]),
    .E(take),
    .Q(\held[1] [7]),
    .QN(_208_)
  );
  flop_e_w1 _462_ (
    .CK(clk),
    .D(\held[0] [8]),
    .E(take),
    .Q(\held[1] [8]),
    .QN(_207_)
  );
  flop_e_w1 _463_ (
    .CK(clk),
    .D(\held[0] [9]),
    .E(take),
    .Q(\held[1] [9]),
    .QN(_242_)
  );
  flop_e_w1 _464_ (
    .CK(clk),
    .D(\held[1] [0]),
    .E(take),
    .Q(\held[2] [0]),
    .QN(_206_)
  );
  flop_e_w1 _465_ (
    .CK(clk),
    .D(\held[1] [1]),
    .E(take),
    .Q(\held[2] [1]),
    .QN(_205_)
  );
  flop_e_w1 _466_ (
    .CK(clk),
    .D(\held[1] [2]),
    .E(take),
    .Q(\held[2] [2]),
    .QN(_204_)
  );
  flop_e_w1 _467_ (
    .CK(clk),
    .D(\held[1] [3]),
    .E(take),
    .Q(\held[2] [3]),
    .QN(_203_)
  );
  flop_e_w1 _468_ (
    .CK(clk),
    .D(\held[1] [4]),
    .E(take),
    .Q(\held[2] [4]),
    .QN(_202_)
  );
  flop_e_w1 _469_ (
    .CK(clk),
    .D(\held[1] [5]),
    .E(take),
    .Q(\held[2] [5]),
    .QN(_201_)
  );
  flop_e_w1 _470_ (
    .CK(clk),
    .D(\held[1] [6]),
    .E(take),
    .Q(\held[2] [6]),
    .QN(_200_)
  );
  flop_e_w1 _471_ (
    .CK(clk),
    .D(\held[1] [7]),
    .E(take),
    .Q(\held[2] [7]),
    .QN(_199_)
  );
  flop_e_w1 _472_ (
    .CK(clk),
    .D(\held[1] [8]),
    .E(take),
    .Q(\held[2] [8]),
    .QN(_198_)
  );
  flop_e_w1 _473_ (
    .CK(clk),
    .D(\held[1] [9]),
    .E(take),
    .Q(\held[2] [9]),
    .QN(_172_)
  );
  flop_r_w1 _474_ (
    .CK(clk),
    .D(_244_[0]),
    .Q(level[0]),
    .QN(_197_),
    .RN(rst_n)
  );
  flop_r_w1 _475_ (
    .CK(clk),
    .D(_245_[1]),
    .Q(level[1]),
    .QN(_196_),
    .RN(rst_n)
  );
  flop_r_w1 _476_ (
    .CK(clk),
    .D(_246_[2]),
    .Q(level[2]),
    .QN(_195_),
    .RN(rst_n)
  );
  flop_r_w1 _477_ (
    .CK(clk),
    .D(_246_[3]),
    .Q(level[3]),
    .QN(_194_),
    .RN(rst_n)
  );
  flop_r_w1 _478_ (
    .CK(clk),
    .D(_246_[4]),
    .Q(level[4]),
    .QN(_193_),
    .RN(rst_n)
  );
  flop_r_w1 _479_ (
    .CK(clk),
    .D(_246_[5]),
    .Q(level[5]),
    .QN(_192_),
    .RN(rst_n)
  );
  flop_r_w1 _480_ (
    .CK(clk),
    .D(_246_[6]),
    .Q(level[6]),
    .QN(_191_),
    .RN(rst_n)
  );
  flop_r_w1 _481_ (
    .CK(clk),
    .D(_246_[7]),
    .Q(level[7]),
    .QN(_190_),
    .RN(rst_n)
  );
  flop_r_w1 _482_ (
    .CK(clk),
    .D(_246_[8]),
    .Q(level[8]),
    .QN(_189_),
    .RN(rst_n)
  );
  flop_r_w1 _483_ (
    .CK(clk),
    .D(_246_[9]),
    .Q(level[9]),
    .QN(_188_),
    .RN(rst_n)
  );
  flop_r_w1 _484_ (
    .CK(clk),
    .D(_246_[10]),
    .Q(level[10]),
    .QN(_187_),
    .RN(rst_n)
  );
  flop_r_w1 _485_ (
    .CK(clk),
    .D(_246_[11]),
    .Q(level[11]),
    .QN(_234_),
    .RN(rst_n)
  );
  flop_r_w1 _486_ (
    .CK(clk),
    .D(take),
    .Q(fresh),
    .QN(_237_),
    .RN(rst_n)
  );
  flop_s_w1 _487_ (
    .CK(clk),
    .D(_000_),
    .Q(high),
    .QN(_238_),
    .SN(rst_n)
  );
  flop_r_w1 _488_ (
    .CK(clk),
    .D(ready),
    .Q(seen[0]),
    .QN(_186_),
    .RN(rst_n)
  );
  flop_r_w1 _489_ (
    .CK(clk),
    .D(seen[0]),
    .Q(seen[1]),
    .QN(_185_),
    .RN(rst_n)
  );
  flop_r_w1 _490_ (
    .CK(clk),
    .D(seen[1]),
    .Q(seen[2]),
    .QN(_235_),
    .RN(rst_n)
  );
  flop_r_w1 _491_ (
    .CK(probe_clk),
    .D(sampled),
    .Q(word[0]),
    .QN(_184_),
    .RN(rst_n)
  );
  flop_r_w1 _492_ (
    .CK(probe_clk),
    .D(word[0]),
    .Q(word[1]),
    .QN(_183_),
    .RN(rst_n)
  );
  flop_r_w1 _493_ (
    .CK(probe_clk),
    .D(word[1]),
    .Q(word[2]),
    .QN(_182_),
    .RN(rst_n)
  );
  flop_r_w1 _494_ (
    .CK(probe_clk),
    .D(word[2]),
    .Q(word[3]),
    .QN(_181_),
    .RN(rst_n)
  );
  flop_r_w1 _495_ (
    .CK(probe_clk),
    .D(word[3]),
    .Q(word[4]),
    .QN(_180_),
    .RN(rst_n)
  );
  flop_r_w1 _496_ (
    .CK(probe_clk),
    .D(word[4]),
    .Q(word[5]),
    .QN(_179_),
    .RN(rst_n)
  );
  flop_r_w1 _497_ (
    .CK(probe_clk),
    .D(word[5]),
    .Q(word[6]),
    .QN(_178_),
    .RN(rst_n)
  );
  flop_r_w1 _498_ (
    .CK(probe_clk),
    .D(word[6]),
    .Q(word[7]),
    .QN(_177_),
    .RN(rst_n)
  );
  flop_r_w1 _499_ (
    .CK(probe_clk),
    .D(word[7]),
    .Q(word[8]),
    .QN(_176_),
    .RN(rst_n)
  );
  flop_r_w1 _500_ (
    .CK(probe_clk),
    .D(word[8]),
    .Q(word[9]),
    .QN(_241_),
    .RN(rst_n)
  );
  flop_r_w1 _501_ (
    .CK(probe_clk),
    .D(_001_[0]),
    .Q(bits[0]),
    .QN(_001_[0]),
    .RN(rst_n)
  );
  flop_r_w1 _502_ (
    .CK(probe_clk),
    .D(_001_[1]),
    .Q(bits[1]),
    .QN(_175_),
    .RN(rst_n)
  );
  flop_r_w1 _503_ (
    .CK(probe_clk),
    .D(_001_[2]),
    .Q(bits[2]),
    .QN(_174_),
    .RN(rst_n)
  );
  flop_r_w1 _504_ (
    .CK(probe_clk),
    .D(_001_[3]),
    .Q(bits[3]),
    .QN(_236_),
    .RN(rst_n)
  );
  flop_nr_w1 _505_ (
    .CKN(probe_clk),
    .D(probe),
    .Q(sampled),
    .QN(_240_),
    .RN(rst_n)
  );
  tie_low _506_ (
    .Y(_243_)
  );
  flop_bank4_w1 offset_bank (
    .CK(clk),
    .D({ _006_, _005_, _004_, _003_ }),
    .Q(offset),
    .RN(rst_n)
  );
  assign _246_[1:0] = { _245_[1], _244_[0] };
  assign _244_[11] = _243_;
  assign _245_[0] = _244_[0];
endmodule

module phase_guard(phase_1, phase_2, level, safe);
  input phase_1;
  wire phase_1;
  input phase_2;
  wire phase_2;
  input [7:0] level;
  wire [7:0] level;
  output [7:0] safe;
  wire [7:0] safe;
  wire _00_;
  wire _01_;
  wire _02_;
  wire _03_;
  wire _04_;
  wire _05_;
  wire _06_;
  wire _07_;
  wire _08_;
  wire _09_;
  wire _10_;
  wire _11_;
  wire _12_;
  wire _13_;
  wire _14_;
  wire _15_;
  wire [15:0] first;
  wire [15:0] now;
  wire [15:0] second;
  and_nor21_w1 _16_ (
    .A(level[6]),
    .B(first[6]),
    .C(second[14]),
    .Y(_00_)
  );
  inv_w1 _17_ (
    .A(_00_),
    .Y(safe[6])
  );
  and_nor21_w1 _18_ (
    .A(level[1]),
    .B(first[1]),
    .C(second[9]),
    .Y(_05_)
  );
  inv_w1 _19_ (
    .A(_05_),
    .Y(safe[1])
  );
  and_nor21_w1 _20_ (
    .A(level[0]),
    .B(first[0]),
    .C(second[8]),
    .Y(_06_)
  );
  inv_w1 _21_ (
    .A(_06_),
    .Y(safe[0])
  );
  or_nand21_w1 _22_ (
    .A(second[6]),
    .B(second[5]),
    .C(level[6]),
    .Y(_07_)
  );
  and_nor21_w1 _23_ (
    .A(second[6]),
    .B(second[5]),
    .C(_07_),
    .Y(now[14])
  );
  or_nand21_w1 _24_ (
    .A(second[5]),
    .B(second[4]),
    .C(level[5]),
    .Y(_08_)
  );
  and_nor21_w1 _25_ (
    .A(second[5]),
    .B(second[4]),
    .C(_08_),
    .Y(now[13])
  );
  or_nand21_w1 _26_ (
    .A(second[4]),
    .B(second[3]),
    .C(level[4]),
    .Y(_09_)
  );
  and_nor21_w1 _27_ (
    .A(second[4]),
    .B(second[3]),
    .C(_09_),
    .Y(now[12])
  );
  and_nor21_w1 _28_ (
    .A(level[5]),
    .B(first[5]),
    .C(second[13]),
    .Y(_01_)
  );
  or_nand21_w1 _29_ (
    .A(second[3]),
    .B(second[2]),
    .C(level[3]),
    .Y(_10_)
  );
  and_nor21_w1 _30_ (
    .A(second[3]),
    .B(second[2]),
    .C(_10_),
    .Y(now[11])
  );
  or_nand21_w1 _31_ (
    .A(second[2]),
    .B(second[1]),
    .C(level[2]),
    .Y(_11_)
  );
  and_nor21_w1 _32_ (
    .A(second[2]),
    .B(second[1]),
    .C(_11_),
    .Y(now[10])
  );
  or_nand21_w1 _33_ (
    .A(second[1]),
    .B(second[0]),
    .C(level[1]),
    .Y(_12_)
  );
  and_nor21_w1 _34_ (
    .A(second[1]),
    .B(second[0]),
    .C(_12_),
    .Y(now[9])
  );
  or_nand21_w1 _35_ (
    .A(second[0]),
    .B(second[7]),
    .C(level[0]),
    .Y(_13_)
  );
  and_nor21_w1 _36_ (
    .A(second[0]),
    .B(second[7]),
    .C(_13_),
    .Y(now[8])
  );
  xor2_w1 _37_ (
    .A(second[14]),
    .B(level[6]),
    .Y(now[6])
  );
  xor2_w1 _38_ (
    .A(second[13]),
    .B(level[5]),
    .Y(now[5])
  );
  inv_w1 _39_ (
    .A(_01_),
    .Y(safe[5])
  );
  xor2_w1 _40_ (
    .A(second[12]),
    .B(level[4]),
    .Y(now[4])
  );
  xor2_w1 _41_ (
    .A(second[11]),
    .B(level[3]),
    .Y(now[3])
  );
  xor2_w1 _42_ (
    .A(second[10]),
    .B(level[2]),
    .Y(now[2])
  );
  xor2_w1 _43_ (
    .A(second[9]),
    .B(level[1]),
    .Y(now[1])
  );
  xor2_w1 _44_ (
    .A(second[8]),
    .B(level[0]),
    .Y(now[0])
  );
  and_nor21_w1 _45_ (
    .A(level[7]),
    .B(first[7]),
    .C(second[15]),
    .Y(_14_)
  );
  inv_w1 _46_ (
    .A(_14_),
    .Y(safe[7])
  );
  or_nand21_w1 _47_ (
    .A(second[6]),
    .B(second[7]),
    .C(level[7]),
    .Y(_15_)
  );
  and_nor21_w1 _48_ (
    .A(second[6]),
    .B(second[7]),
    .C(_15_),
    .Y(now[15])
  );
  xor2_w1 _49_ (
    .A(second[15]),
    .B(level[7]),
    .Y(now[7])
  );
  and_nor21_w1 _50_ (
    .A(level[4]),
    .B(first[4]),
    .C(second[12]),
    .Y(_02_)
  );
  inv_w1 _51_ (
    .A(_02_),
    .Y(safe[4])
  );
  and_nor21_w1 _52_ (
    .A(level[3]),
    .B(first[3]),
    .C(second[11]),
    .Y(_03_)
  );
  inv_w1 _53_ (
    .A(_03_),
    .Y(safe[3])
  );
  and_nor21_w1 _54_ (
    .A(level[2]),
    .B(first[2]),
    .C(second[10]),
    .Y(_04_)
  );
  inv_w1 _55_ (
    .A(_04_),
    .Y(safe[2])
  );
  latch_w1 \master[0]  (
    .D(now[0]),
    .G(phase_1),
    .Q(first[0])
  );
  latch_w1 \master[10]  (
    .D(now[10]),
    .G(phase_1),
    .Q(first[10])
  );
  latch_w1 \master[11]  (
    .D(now[11]),
    .G(phase_1),
    .Q(first[11])
  );
  latch_w1 \master[12]  (
    .D(now[12]),
    .G(phase_1),
    .Q(first[12])
  );
  latch_w1 \master[13]  (
    .D(now[13]),
    .G(phase_1),
    .Q(first[13])
  );
  latch_w1 \master[14]  (
    .D(now[14]),
    .G(phase_1),
    .Q(first[14])
  );
  latch_w1 \master[15]  (
    .D(now[15]),
    .G(phase_1),
    .Q(first[15])
  );
  latch_w1 \master[1]  (
    .D(now[1]),
    .G(phase_1),
    .Q(first[1])
  );
  latch_w1 \master[2]  (
    .D(now[2]),
    .G(phase_1),
    .Q(first[2])
  );
  latch_w1 \master[3]  (
    .D(now[3]),
    .G(phase_1),
    .Q(first[3])
  );
  latch_w1 \master[4]  (
    .D(now[4]),
    .G(phase_1),
    .Q(first[4])
  );
  latch_w1 \master[5]  (
    .D(now[5]),
    .G(phase_1),
    .Q(first[5])
  );
  latch_w1 \master[6]  (
    .D(now[6]),
    .G(phase_1),
    .Q(first[6])
  );
  latch_w1 \master[7]  (
    .D(now[7]),
    .G(phase_1),
    .Q(first[7])
  );
  latch_w1 \master[8]  (
    .D(now[8]),
    .G(phase_1),
    .Q(first[8])
  );
  latch_w1 \master[9]  (
    .D(now[9]),
    .G(phase_1),
    .Q(first[9])
  );
  latch_w1 \slave[0]  (
    .D(first[0]),
    .G(phase_2),
    .Q(second[0])
  );
  latch_w1 \slave[10]  (
    .D(first[10]),
    .G(phase_2),
    .Q(second[10])
  );
  latch_w1 \slave[11]  (
    .D(first[11]),
    .G(phase_2),
    .Q(second[11])
  );
  latch_w1 \slave[12]  (
    .D(first[12]),
    .G(phase_2),
    .Q(second[12])
  );
  latch_w1 \slave[13]  (
    .D(first[13]),
    .G(phase_2),
    .Q(second[13])
  );
  latch_w1 \slave[14]  (
    .D(first[14]),
    .G(phase_2),
    .Q(second[14])
  );
  latch_w1 \slave[15]  (
    .D(first[15]),
    .G(phase_2),
    .Q(second[15])
  );
  latch_w1 \slave[1]  (
    .D(first[1]),
    .G(phase_2),
    .Q(second[1])
  );
  latch_w1 \slave[2]  (
    .D(first[2]),
    .G(phase_2),
    .Q(second[2])
  );
  latch_w1 \slave[3]  (
    .D(first[3]),
    .G(phase_2),
    .Q(second[3])
  );
  latch_w1 \slave[4]  (
    .D(first[4]),
    .G(phase_2),
    .Q(second[4])
  );
  latch_w1 \slave[5]  (
    .D(first[5]),
    .G(phase_2),
    .Q(second[5])
  );
  latch_w1 \slave[6]  (
    .D(first[6]),
    .G(phase_2),
    .Q(second[6])
  );
  latch_w1 \slave[7]  (
    .D(first[7]),
    .G(phase_2),
    .Q(second[7])
  );
  latch_w1 \slave[8]  (
    .D(first[8]),
    .G(phase_2),
    .Q(second[8])
  );
  latch_w1 \slave[9]  (
    .D(first[9]),
    .G(phase_2),
    .Q(second[9])
  );
endmodule

module shore_sender(clk, rst_n, alarm, level, serial_out, beacon);
  input clk;
  wire clk;
  input rst_n;
  wire rst_n;
  input alarm;
  wire alarm;
  input [7:0] level;
  wire [7:0] level;
  output serial_out;
  wire serial_out;
  output beacon;
  wire beacon;
  wire [10:0] _000_;
  wire [3:0] _001_;
  wire _002_;
  wire _003_;
  wire _004_;
  wire _005_;
  wire _006_;
  wire _007_;
  wire _008_;
  wire _009_;
  wire _010_;
  wire _011_;
  wire _012_;
  wire _013_;
  wire _014_;
  wire _015_;
  wire _016_;
  wire _017_;
  wire _018_;
  wire _019_;
  wire _020_;
  wire _021_;
  wire _022_;
  wire _023_;
  wire _024_;
  wire _025_;
  wire _026_;
  wire _027_;
  wire _028_;
  wire _029_;
  wire _030_;
  wire _031_;
  wire _032_;
  wire _033_;
  wire _034_;
  wire _035_;
  wire _036_;
  wire _037_;
  wire _038_;
  wire _039_;
  wire _040_;
  wire _041_;
  wire _042_;
  wire _043_;
  wire _044_;
  wire _045_;
  wire [10:0] frame;
  wire lamp_n;
  wire [3:0] left;
  wire [15:0] turn;
  inv_w1 _046_ (
    .A(left[3]),
    .Y(_003_)
  );
  inv_w1 _047_ (
    .A(lamp_n),
    .Y(beacon)
  );
  mux2_w1 _048_ (
    .A(level[6]),
    .B(frame[8]),
    .S(_007_),
    .Y(_000_[7])
  );
  mux2_w1 _049_ (
    .A(level[5]),
    .B(frame[7]),
    .S(_007_),
    .Y(_000_[6])
  );
  mux2_w1 _050_ (
    .A(level[4]),
    .B(frame[6]),
    .S(_007_),
    .Y(_000_[5])
  );
  mux2_w1 _051_ (
    .A(level[3]),
    .B(frame[5]),
    .S(_007_),
    .Y(_000_[4])
  );
  mux2_w1 _052_ (
    .A(level[2]),
    .B(frame[4]),
    .S(_007_),
    .Y(_000_[3])
  );
  mux2_w1 _053_ (
    .A(level[1]),
    .B(frame[3]),
    .S(_007_),
    .Y(_000_[2])
  );
  mux2_w1 _054_ (
    .A(level[0]),
    .B(frame[2]),
    .S(_007_),
    .Y(_000_[1])
  );
  and2_w1 _055_ (
    .A(frame[1]),
    .B(_007_),
    .Y(_000_[0])
  );
  xnor2_w1 _056_ (
    .A(_003_),
    .B(_004_),
    .Y(_001_[3])
  );
  mux2_w1 _057_ (
    .A(alarm),
    .B(frame[10]),
    .S(_007_),
    .Y(_000_[9])
  );
  nor3_w1 _058_ (
    .A(left[2]),
    .B(left[0]),
    .C(left[1]),
    .Y(_004_)
  );
  xnor2_w1 _059_ (
    .A(level[7]),
    .B(level[2]),
    .Y(_008_)
  );
  xnor2_w1 _060_ (
    .A(level[1]),
    .B(_008_),
    .Y(_009_)
  );
  xor2_w1 _061_ (
    .A(level[4]),
    .B(level[3]),
    .Y(_010_)
  );
  xnor2_w1 _062_ (
    .A(_009_),
    .B(_010_),
    .Y(_011_)
  );
  xor2_w1 _063_ (
    .A(level[0]),
    .B(alarm),
    .Y(_012_)
  );
  xnor2_w1 _064_ (
    .A(level[6]),
    .B(level[5]),
    .Y(_013_)
  );
  xnor2_w1 _065_ (
    .A(_012_),
    .B(_013_),
    .Y(_014_)
  );
  and_nor21_w1 _066_ (
    .A(_011_),
    .B(_014_),
    .C(_007_),
    .Y(_015_)
  );
  or_nand21_w1 _067_ (
    .A(_011_),
    .B(_014_),
    .C(_015_),
    .Y(_000_[10])
  );
  nand2_w1 _068_ (
    .A(left[3]),
    .B(_004_),
    .Y(_005_)
  );
  or_nand21_w1 _069_ (
    .A(left[0]),
    .B(left[1]),
    .C(left[2]),
    .Y(_006_)
  );
  nand2_w1 _070_ (
    .A(_005_),
    .B(_006_),
    .Y(_001_[2])
  );
  xnor2_w1 _071_ (
    .A(left[0]),
    .B(left[1]),
    .Y(_001_[1])
  );
  nand2_w1 _072_ (
    .A(_003_),
    .B(_004_),
    .Y(_007_)
  );
  and2_w1 _073_ (
    .A(_002_),
    .B(_007_),
    .Y(_001_[0])
  );
  mux2_w1 _074_ (
    .A(level[7]),
    .B(frame[9]),
    .S(_007_),
    .Y(_000_[8])
  );
  flop_s_w1 _075_ (
    .CK(clk),
    .D(_000_[0]),
    .Q(serial_out),
    .QN(_023_),
    .SN(rst_n)
  );
  flop_s_w1 _076_ (
    .CK(clk),
    .D(_000_[1]),
    .Q(frame[1]),
    .QN(_044_),
    .SN(rst_n)
  );
  flop_s_w1 _077_ (
    .CK(clk),
    .D(_000_[2]),
    .Q(frame[2]),
    .QN(_045_),
    .SN(rst_n)
  );
  flop_s_w1 _078_ (
    .CK(clk),
    .D(_000_[3]),
    .Q(frame[3]),
    .QN(_030_),
    .SN(rst_n)
  );
  flop_s_w1 _079_ (
    .CK(clk),
    .D(_000_[4]),
    .Q(frame[4]),
    .QN(_040_),
    .SN(rst_n)
  );
  flop_s_w1 _080_ (
    .CK(clk),
    .D(_000_[5]),
    .Q(frame[5]),
    .QN(_035_),
    .SN(rst_n)
  );
  flop_s_w1 _081_ (
    .CK(clk),
    .D(_000_[6]),
    .Q(frame[6]),
    .QN(_037_),
    .SN(rst_n)
  );
  flop_s_w1 _082_ (
    .CK(clk),
    .D(_000_[7]),
    .Q(frame[7]),
    .QN(_043_),
    .SN(rst_n)
  );
  flop_s_w1 _083_ (
    .CK(clk),
    .D(_000_[8]),
    .Q(frame[8]),
    .QN(_020_),
    .SN(rst_n)
  );
  flop_s_w1 _084_ (
    .CK(clk),
    .D(_000_[9]),
    .Q(frame[9]),
    .QN(_033_),
    .SN(rst_n)
  );
  flop_s_w1 _085_ (
    .CK(clk),
    .D(_000_[10]),
    .Q(frame[10]),
    .QN(_016_),
    .SN(rst_n)
  );
  flop_r_w1 _086_ (
    .CK(clk),
    .D(_001_[0]),
    .Q(left[0]),
    .QN(_002_),
    .RN(rst_n)
  );
  flop_r_w1 _087_ (
    .CK(clk),
    .D(_001_[1]),
    .Q(left[1]),
    .QN(_021_),
    .RN(rst_n)
  );
  flop_r_w1 _088_ (
    .CK(clk),
    .D(_001_[2]),
    .Q(left[2]),
    .QN(_025_),
    .RN(rst_n)
  );
  flop_r_w1 _089_ (
    .CK(clk),
    .D(_001_[3]),
    .Q(left[3]),
    .QN(_038_),
    .RN(rst_n)
  );
  flop_s_w1 _090_ (
    .CK(clk),
    .D(turn[15]),
    .Q(turn[0]),
    .QN(_041_),
    .SN(rst_n)
  );
  flop_r_w1 _091_ (
    .CK(clk),
    .D(turn[0]),
    .Q(turn[1]),
    .QN(_032_),
    .RN(rst_n)
  );
  flop_r_w1 _092_ (
    .CK(clk),
    .D(turn[1]),
    .Q(turn[2]),
    .QN(_034_),
    .RN(rst_n)
  );
  flop_r_w1 _093_ (
    .CK(clk),
    .D(turn[2]),
    .Q(turn[3]),
    .QN(_022_),
    .RN(rst_n)
  );
  flop_r_w1 _094_ (
    .CK(clk),
    .D(turn[3]),
    .Q(turn[4]),
    .QN(_024_),
    .RN(rst_n)
  );
  flop_r_w1 _095_ (
    .CK(clk),
    .D(turn[4]),
    .Q(turn[5]),
    .QN(_027_),
    .RN(rst_n)
  );
  flop_r_w1 _096_ (
    .CK(clk),
    .D(turn[5]),
    .Q(turn[6]),
    .QN(_026_),
    .RN(rst_n)
  );
  flop_r_w1 _097_ (
    .CK(clk),
    .D(turn[6]),
    .Q(turn[7]),
    .QN(_029_),
    .RN(rst_n)
  );
  flop_r_w1 _098_ (
    .CK(clk),
    .D(turn[7]),
    .Q(turn[8]),
    .QN(_028_),
    .RN(rst_n)
  );
  flop_r_w1 _099_ (
    .CK(clk),
    .D(turn[8]),
    .Q(turn[9]),
    .QN(_042_),
    .RN(rst_n)
  );
  flop_r_w1 _100_ (
    .CK(clk),
    .D(turn[9]),
    .Q(turn[10]),
    .QN(_017_),
    .RN(rst_n)
  );
  flop_r_w1 _101_ (
    .CK(clk),
    .D(turn[10]),
    .Q(turn[11]),
    .QN(_018_),
    .RN(rst_n)
  );
  flop_r_w1 _102_ (
    .CK(clk),
    .D(turn[11]),
    .Q(turn[12]),
    .QN(_019_),
    .RN(rst_n)
  );
  flop_r_w1 _103_ (
    .CK(clk),
    .D(turn[12]),
    .Q(turn[13]),
    .QN(_031_),
    .RN(rst_n)
  );
  flop_r_w1 _104_ (
    .CK(clk),
    .D(turn[13]),
    .Q(turn[14]),
    .QN(_036_),
    .RN(rst_n)
  );
  flop_r_w1 _105_ (
    .CK(clk),
    .D(turn[14]),
    .Q(turn[15]),
    .QN(_039_),
    .RN(rst_n)
  );
  flop_inverse_w1 lamp (
    .CK(clk),
    .D(turn[15]),
    .QN(lamp_n)
  );
  assign frame[0] = serial_out;
endmodule

module slow_clock(clk, rst_n, slow);
  input clk;
  wire clk;
  input rst_n;
  wire rst_n;
  output slow;
  wire slow;
  wire _0_;
  wire _1_;
  wire _2_;
  wire by_2;
  wire by_4;
  flop_r_w1 _3_ (
    .CK(by_4),
    .D(_2_),
    .Q(slow),
    .QN(_2_),
    .RN(rst_n)
  );
  flop_r_w1 _4_ (
    .CK(by_2),
    .D(_1_),
    .Q(by_4),
    .QN(_1_),
    .RN(rst_n)
  );
  flop_r_w1 _5_ (
    .CK(clk),
    .D(_0_),
    .Q(by_2),
    .QN(_0_),
    .RN(rst_n)
  );
endmodule

module sluice_control(clk, rst_n, level, limit, high, gate_open, gate_close, alarm);
  input clk;
  wire clk;
  input rst_n;
  wire rst_n;
  input [11:0] level;
  wire [11:0] level;
  input [1:0] limit;
  wire [1:0] limit;
  input [3:0] high;
  wire [3:0] high;
  output gate_open;
  wire gate_open;
  output gate_close;
  wire gate_close;
  output alarm;
  wire alarm;
  wire _000_;
  wire [3:0] _001_;
  wire [9:0] _002_;
  wire _003_;
  wire _004_;
  wire _005_;
  wire _006_;
  wire _007_;
  wire _008_;
  wire _009_;
  wire _010_;
  wire _011_;
  wire _012_;
  wire _013_;
  wire _014_;
  wire _015_;
  wire _016_;
  wire _017_;
  wire _018_;
  wire _019_;
  wire _020_;
  wire _021_;
  wire _022_;
  wire _023_;
  wire _024_;
  wire _025_;
  wire _026_;
  wire _027_;
  wire _028_;
  wire _029_;
  wire _030_;
  wire _031_;
  wire _032_;
  wire _033_;
  wire _034_;
  wire _035_;
  wire _036_;
  wire _037_;
  wire _038_;
  wire _039_;
  wire _040_;
  wire _041_;
  wire _042_;
  wire _043_;
  wire _044_;
  wire _045_;
  wire _046_;
  wire _047_;
  wire _048_;
  wire _049_;
  wire _050_;
  wire _051_;
  wire _052_;
  wire _053_;
  wire _054_;
  wire _055_;
  wire _056_;
  wire _057_;
  wire _058_;
  wire _059_;
  wire _060_;
  wire _061_;
  wire _062_;
  wire _063_;
  wire _064_;
  wire _065_;
  wire _066_;
  wire _067_;
  wire _068_;
  wire _069_;
  wire _070_;
  wire _071_;
  wire _072_;
  wire _073_;
  wire _074_;
  wire _075_;
  wire _076_;
  wire _077_;
  wire _078_;
  wire _079_;
  wire _080_;
  wire _081_;
  wire _082_;
  wire _083_;
  wire _084_;
  wire _085_;
  wire _086_;
  wire _087_;
  wire _088_;
  wire _089_;
  wire _090_;
  wire _091_;
  wire _092_;
  wire _093_;
  wire _094_;
  wire _095_;
  wire _096_;
  wire _097_;
  wire _098_;
  wire _099_;
  wire _100_;
  wire _101_;
  wire _102_;
  wire _103_;
  wire _104_;
  wire _105_;
  wire _106_;
  wire _107_;
  wire _108_;
  wire _109_;
  wire _110_;
  wire _111_;
  wire _112_;
  wire _113_;
  wire _114_;
  wire _115_;
  wire _116_;
  wire _117_;
  wire _118_;
  wire _119_;
  wire _120_;
  wire _121_;
  wire _122_;
  wire _123_;
  wire _124_;
  wire _125_;
  wire _126_;
  wire _127_;
  wire _128_;
  wire _129_;
  wire _130_;
  wire _131_;
  wire _132_;
  wire alarm_n;
  wire [11:0] \before ;
  wire [3:0] state;
  wire [9:0] wait_time;
  wire warned;
  inv_w1 _133_ (
    .A(level[6]),
    .Y(_074_)
  );
  inv_w1 _134_ (
    .A(level[8]),
    .Y(_075_)
  );
  inv_w1 _135_ (
    .A(\before [2]),
    .Y(_084_)
  );
  nor2_w1 _136_ (
    .A(wait_time[4]),
    .B(_103_),
    .Y(_068_)
  );
  nor3_w1 _137_ (
    .A(_104_),
    .B(_064_),
    .C(_068_),
    .Y(_002_[4])
  );
  nor2_w1 _138_ (
    .A(wait_time[3]),
    .B(_102_),
    .Y(_069_)
  );
  nor3_w1 _139_ (
    .A(_103_),
    .B(_064_),
    .C(_069_),
    .Y(_002_[3])
  );
  and_nor21_w1 _140_ (
    .A(wait_time[0]),
    .B(wait_time[1]),
    .C(wait_time[2]),
    .Y(_070_)
  );
  nor3_w1 _141_ (
    .A(_102_),
    .B(_064_),
    .C(_070_),
    .Y(_002_[2])
  );
  xnor2_w1 _142_ (
    .A(wait_time[0]),
    .B(wait_time[1]),
    .Y(_071_)
  );
  nor2_w1 _143_ (
    .A(_064_),
    .B(_071_),
    .Y(_002_[1])
  );
  nor2_w1 _144_ (
    .A(wait_time[0]),
    .B(_064_),
    .Y(_002_[0])
  );
  nand2_w1 _145_ (
    .A(_012_),
    .B(_060_),
    .Y(_072_)
  );
  inv_w1 _146_ (
    .A(\before [3]),
    .Y(_085_)
  );
  nand2_w1 _147_ (
    .A(_015_),
    .B(_072_),
    .Y(_001_[0])
  );
  nor3_w1 _148_ (
    .A(_099_),
    .B(_020_),
    .C(_053_),
    .Y(_003_)
  );
  nor2_w1 _149_ (
    .A(wait_time[9]),
    .B(_108_),
    .Y(_073_)
  );
  nor3_w1 _150_ (
    .A(_010_),
    .B(_064_),
    .C(_073_),
    .Y(_002_[9])
  );
  nand2_w1 _151_ (
    .A(warned),
    .B(_100_),
    .Y(_000_)
  );
  inv_w1 _152_ (
    .A(\before [5]),
    .Y(_086_)
  );
  inv_w1 _153_ (
    .A(\before [8]),
    .Y(_087_)
  );
  inv_w1 _154_ (
    .A(\before [9]),
    .Y(_088_)
  );
  inv_w1 _155_ (
    .A(\before [10]),
    .Y(_089_)
  );
  inv_w1 _156_ (
    .A(\before [11]),
    .Y(_090_)
  );
  and4_w1 _157_ (
    .A(high[2]),
    .B(high[3]),
    .C(high[0]),
    .D(high[1]),
    .Y(_091_)
  );
  or4_w1 _158_ (
    .A(level[4]),
    .B(level[1]),
    .C(level[3]),
    .D(level[7]),
    .Y(_092_)
  );
  nor4_w1 _159_ (
    .A(level[6]),
    .B(level[5]),
    .C(level[0]),
    .D(level[2]),
    .Y(_093_)
  );
  inv_w1 _160_ (
    .A(level[9]),
    .Y(_076_)
  );
  or_nand21_w1 _161_ (
    .A(limit[0]),
    .B(_075_),
    .C(_093_),
    .Y(_094_)
  );
  and_nor22_w1 _162_ (
    .A(limit[0]),
    .B(_075_),
    .C(_076_),
    .D(limit[1]),
    .Y(_095_)
  );
  or_nand21_w1 _163_ (
    .A(_092_),
    .B(_094_),
    .C(_095_),
    .Y(_096_)
  );
  or_nand21_w1 _164_ (
    .A(_076_),
    .B(limit[1]),
    .C(_096_),
    .Y(_097_)
  );
  or2_w1 _165_ (
    .A(level[10]),
    .B(_097_),
    .Y(_098_)
  );
  and_nor21_w1 _166_ (
    .A(level[11]),
    .B(_098_),
    .C(_091_),
    .Y(_099_)
  );
  inv_w1 _167_ (
    .A(_099_),
    .Y(_100_)
  );
  nor2_w1 _168_ (
    .A(_005_),
    .B(_100_),
    .Y(_101_)
  );
  and3_w1 _169_ (
    .A(wait_time[2]),
    .B(wait_time[0]),
    .C(wait_time[1]),
    .Y(_102_)
  );
  and4_w1 _170_ (
    .A(wait_time[3]),
    .B(wait_time[2]),
    .C(wait_time[0]),
    .D(wait_time[1]),
    .Y(_103_)
  );
  inv_w1 _171_ (
    .A(level[2]),
    .Y(_077_)
  );
  and2_w1 _172_ (
    .A(wait_time[4]),
    .B(_103_),
    .Y(_104_)
  );
  and2_w1 _173_ (
    .A(wait_time[5]),
    .B(_104_),
    .Y(_105_)
  );
  and2_w1 _174_ (
    .A(wait_time[6]),
    .B(_105_),
    .Y(_106_)
  );
  and2_w1 _175_ (
    .A(wait_time[7]),
    .B(_106_),
    .Y(_107_)
  );
  and2_w1 _176_ (
    .A(wait_time[8]),
    .B(_107_),
    .Y(_108_)
  );
  and2_w1 _177_ (
    .A(wait_time[9]),
    .B(_108_),
    .Y(_010_)
  );
  nand2_w1 _178_ (
    .A(wait_time[9]),
    .B(_108_),
    .Y(_011_)
  );
  nor2_w1 _179_ (
    .A(state[0]),
    .B(gate_open),
    .Y(_012_)
  );
  and_nor21_w1 _180_ (
    .A(gate_open),
    .B(_011_),
    .C(state[0]),
    .Y(_013_)
  );
  inv_w1 _181_ (
    .A(_013_),
    .Y(_014_)
  );
  inv_w1 _182_ (
    .A(level[10]),
    .Y(_078_)
  );
  nand2_w1 _183_ (
    .A(state[0]),
    .B(_099_),
    .Y(_015_)
  );
  and_nor21_w1 _184_ (
    .A(state[0]),
    .B(_099_),
    .C(_013_),
    .Y(_016_)
  );
  mux2_w1 _185_ (
    .A(_016_),
    .B(gate_open),
    .S(_101_),
    .Y(_009_)
  );
  nor3_w1 _186_ (
    .A(state[0]),
    .B(_004_),
    .C(_010_),
    .Y(_017_)
  );
  or2_w1 _187_ (
    .A(_101_),
    .B(_017_),
    .Y(_018_)
  );
  or2_w1 _188_ (
    .A(level[11]),
    .B(_090_),
    .Y(_019_)
  );
  inv_w1 _189_ (
    .A(_019_),
    .Y(_020_)
  );
  and_nor22_w1 _190_ (
    .A(level[10]),
    .B(_089_),
    .C(_090_),
    .D(level[11]),
    .Y(_021_)
  );
  inv_w1 _191_ (
    .A(_021_),
    .Y(_022_)
  );
  and_nor22_w1 _192_ (
    .A(level[8]),
    .B(_087_),
    .C(_088_),
    .D(level[9]),
    .Y(_023_)
  );
  inv_w1 _193_ (
    .A(level[3]),
    .Y(_079_)
  );
  nor2_w1 _194_ (
    .A(level[8]),
    .B(_087_),
    .Y(_024_)
  );
  nand2_w1 _195_ (
    .A(_075_),
    .B(\before [8]),
    .Y(_025_)
  );
  or_nand22_w1 _196_ (
    .A(_080_),
    .B(\before [7]),
    .C(\before [6]),
    .D(_074_),
    .Y(_026_)
  );
  nand2_w1 _197_ (
    .A(_080_),
    .B(\before [7]),
    .Y(_027_)
  );
  and2_w1 _198_ (
    .A(_074_),
    .B(\before [6]),
    .Y(_028_)
  );
  or_nand21_w1 _199_ (
    .A(level[5]),
    .B(_086_),
    .C(_027_),
    .Y(_029_)
  );
  nor3_w1 _200_ (
    .A(_026_),
    .B(_028_),
    .C(_029_),
    .Y(_030_)
  );
  and_nor22_w1 _201_ (
    .A(level[4]),
    .B(_082_),
    .C(_086_),
    .D(level[5]),
    .Y(_031_)
  );
  or2_w1 _202_ (
    .A(level[4]),
    .B(_082_),
    .Y(_032_)
  );
  inv_w1 _203_ (
    .A(_032_),
    .Y(_033_)
  );
  inv_w1 _204_ (
    .A(level[7]),
    .Y(_080_)
  );
  or_nand22_w1 _205_ (
    .A(_077_),
    .B(\before [2]),
    .C(\before [3]),
    .D(_079_),
    .Y(_034_)
  );
  nand2_w1 _206_ (
    .A(_079_),
    .B(\before [3]),
    .Y(_035_)
  );
  or_nand22_w1 _207_ (
    .A(level[2]),
    .B(_084_),
    .C(_085_),
    .D(level[3]),
    .Y(_036_)
  );
  or_nand22_w1 _208_ (
    .A(level[0]),
    .B(_081_),
    .C(_083_),
    .D(level[1]),
    .Y(_037_)
  );
  nor3_w1 _209_ (
    .A(_034_),
    .B(_036_),
    .C(_037_),
    .Y(_038_)
  );
  and2_w1 _210_ (
    .A(_034_),
    .B(_035_),
    .Y(_039_)
  );
  nand2_w1 _211_ (
    .A(level[1]),
    .B(_083_),
    .Y(_040_)
  );
  nor3_w1 _212_ (
    .A(_034_),
    .B(_036_),
    .C(_040_),
    .Y(_041_)
  );
  nor3_w1 _213_ (
    .A(_038_),
    .B(_039_),
    .C(_041_),
    .Y(_042_)
  );
  or_nand21_w1 _214_ (
    .A(_033_),
    .B(_042_),
    .C(_031_),
    .Y(_043_)
  );
  inv_w1 _215_ (
    .A(\before [0]),
    .Y(_081_)
  );
  and_nor22_w1 _216_ (
    .A(_026_),
    .B(_027_),
    .C(_030_),
    .D(_043_),
    .Y(_044_)
  );
  or_nand21_w1 _217_ (
    .A(_024_),
    .B(_044_),
    .C(_023_),
    .Y(_045_)
  );
  and_nor22_w1 _218_ (
    .A(_076_),
    .B(\before [9]),
    .C(\before [10]),
    .D(_078_),
    .Y(_046_)
  );
  nand2_w1 _219_ (
    .A(level[0]),
    .B(_081_),
    .Y(_047_)
  );
  nand3_w1 _220_ (
    .A(_032_),
    .B(_040_),
    .C(_047_),
    .Y(_048_)
  );
  nand4_w1 _221_ (
    .A(_019_),
    .B(_023_),
    .C(_025_),
    .D(_031_),
    .Y(_049_)
  );
  nor2_w1 _222_ (
    .A(_048_),
    .B(_049_),
    .Y(_050_)
  );
  nand3_w1 _223_ (
    .A(_030_),
    .B(_038_),
    .C(_050_),
    .Y(_051_)
  );
  and2_w1 _224_ (
    .A(_046_),
    .B(_051_),
    .Y(_052_)
  );
  and_nor21_w1 _225_ (
    .A(_045_),
    .B(_052_),
    .C(_022_),
    .Y(_053_)
  );
  inv_w1 _226_ (
    .A(\before [4]),
    .Y(_082_)
  );
  or_nand21_w1 _227_ (
    .A(_020_),
    .B(_053_),
    .C(_099_),
    .Y(_054_)
  );
  and_nor21_w1 _228_ (
    .A(state[2]),
    .B(_054_),
    .C(gate_open),
    .Y(_055_)
  );
  or2_w1 _229_ (
    .A(_014_),
    .B(_018_),
    .Y(_056_)
  );
  nand2_w1 _230_ (
    .A(state[2]),
    .B(_018_),
    .Y(_057_)
  );
  or_nand21_w1 _231_ (
    .A(_055_),
    .B(_056_),
    .C(_057_),
    .Y(_008_)
  );
  nor3_w1 _232_ (
    .A(_006_),
    .B(state[0]),
    .C(gate_open),
    .Y(_058_)
  );
  and_nor21_w1 _233_ (
    .A(_054_),
    .B(_058_),
    .C(_018_),
    .Y(_059_)
  );
  and_nor21_w1 _234_ (
    .A(gate_close),
    .B(_011_),
    .C(state[2]),
    .Y(_060_)
  );
  or3_w1 _235_ (
    .A(state[0]),
    .B(gate_open),
    .C(_060_),
    .Y(_061_)
  );
  and_nor21_w1 _236_ (
    .A(state[2]),
    .B(_054_),
    .C(_061_),
    .Y(_062_)
  );
  inv_w1 _237_ (
    .A(\before [1]),
    .Y(_083_)
  );
  mux2_w1 _238_ (
    .A(gate_close),
    .B(_062_),
    .S(_059_),
    .Y(_007_)
  );
  nor2_w1 _239_ (
    .A(wait_time[8]),
    .B(_107_),
    .Y(_063_)
  );
  nor2_w1 _240_ (
    .A(gate_close),
    .B(gate_open),
    .Y(_064_)
  );
  nor3_w1 _241_ (
    .A(_108_),
    .B(_063_),
    .C(_064_),
    .Y(_002_[8])
  );
  nor2_w1 _242_ (
    .A(wait_time[7]),
    .B(_106_),
    .Y(_065_)
  );
  nor3_w1 _243_ (
    .A(_107_),
    .B(_064_),
    .C(_065_),
    .Y(_002_[7])
  );
  nor2_w1 _244_ (
    .A(wait_time[6]),
    .B(_105_),
    .Y(_066_)
  );
  nor3_w1 _245_ (
    .A(_106_),
    .B(_064_),
    .C(_066_),
    .Y(_002_[6])
  );
  nor2_w1 _246_ (
    .A(wait_time[5]),
    .B(_104_),
    .Y(_067_)
  );
  nor3_w1 _247_ (
    .A(_105_),
    .B(_064_),
    .C(_067_),
    .Y(_002_[5])
  );
  flop_s_w1 _248_ (
    .CK(clk),
    .D(_001_[0]),
    .Q(state[0]),
    .QN(_005_),
    .SN(rst_n)
  );
  flop_r_w1 _249_ (
    .CK(clk),
    .D(_009_),
    .Q(gate_open),
    .QN(_004_),
    .RN(rst_n)
  );
  flop_r_w1 _250_ (
    .CK(clk),
    .D(_008_),
    .Q(state[2]),
    .QN(_006_),
    .RN(rst_n)
  );
  flop_r_w1 _251_ (
    .CK(clk),
    .D(_007_),
    .Q(gate_close),
    .QN(_111_),
    .RN(rst_n)
  );
  flop_r_w1 _252_ (
    .CK(clk),
    .D(_002_[0]),
    .Q(wait_time[0]),
    .QN(_126_),
    .RN(rst_n)
  );
  flop_r_w1 _253_ (
    .CK(clk),
    .D(_002_[1]),
    .Q(wait_time[1]),
    .QN(_120_),
    .RN(rst_n)
  );
  flop_r_w1 _254_ (
    .CK(clk),
    .D(_002_[2]),
    .Q(wait_time[2]),
    .QN(_118_),
    .RN(rst_n)
  );
  flop_r_w1 _255_ (
    .CK(clk),
    .D(_002_[3]),
    .Q(wait_time[3]),
    .QN(_114_),
    .RN(rst_n)
  );
  flop_r_w1 _256_ (
    .CK(clk),
    .D(_002_[4]),
    .Q(wait_time[4]),
    .QN(_131_),
    .RN(rst_n)
  );
  flop_r_w1 _257_ (
    .CK(clk),
    .D(_002_[5]),
    .Q(wait_time[5]),
    .QN(_117_),
    .RN(rst_n)
  );
  flop_r_w1 _258_ (
    .CK(clk),
    .D(_002_[6]),
    .Q(wait_time[6]),
    .QN(_109_),
    .RN(rst_n)
  );
  flop_r_w1 _259_ (
    .CK(clk),
    .D(_002_[7]),
    .Q(wait_time[7]),
    .QN(_110_),
    .RN(rst_n)
  );
  flop_r_w1 _260_ (
    .CK(clk),
    .D(_002_[8]),
    .Q(wait_time[8]),
    .QN(_116_),
    .RN(rst_n)
  );
  flop_r_w1 _261_ (
    .CK(clk),
    .D(_002_[9]),
    .Q(wait_time[9]),
    .QN(_130_),
    .RN(rst_n)
  );
  flop_r_w1 _262_ (
    .CK(clk),
    .D(level[0]),
    .Q(\before [0]),
    .QN(_113_),
    .RN(rst_n)
  );
  flop_r_w1 _263_ (
    .CK(clk),
    .D(level[1]),
    .Q(\before [1]),
    .QN(_127_),
    .RN(rst_n)
  );
  flop_r_w1 _264_ (
    .CK(clk),
    .D(level[2]),
    .Q(\before [2]),
    .QN(_132_),
    .RN(rst_n)
  );
  flop_r_w1 _265_ (
    .CK(clk),
    .D(level[3]),
    .Q(\before [3]),
    .QN(_125_),
    .RN(rst_n)
  );
  flop_r_w1 _266_ (
    .CK(clk),
    .D(level[4]),
    .Q(\before [4]),
    .QN(_119_),
    .RN(rst_n)
  );
  flop_r_w1 _267_ (
    .CK(clk),
    .D(level[5]),
    .Q(\before [5]),
    .QN(_124_),
    .RN(rst_n)
  );
  flop_r_w1 _268_ (
    .CK(clk),
    .D(level[6]),
    .Q(\before [6]),
    .QN(_115_),
    .RN(rst_n)
  );
  flop_r_w1 _269_ (
    .CK(clk),
    .D(level[7]),
    .Q(\before [7]),
    .QN(_122_),
    .RN(rst_n)
  );
  flop_r_w1 _270_ (
    .CK(clk),
    .D(level[8]),
    .Q(\before [8]),
    .QN(_123_),
    .RN(rst_n)
  );
  flop_r_w1 _271_ (
    .CK(clk),
    .D(level[9]),
    .Q(\before [9]),
    .QN(_121_),
    .RN(rst_n)
  );
  flop_r_w1 _272_ (
    .CK(clk),
    .D(level[10]),
    .Q(\before [10]),
    .QN(_112_),
    .RN(rst_n)
  );
  flop_r_w1 _273_ (
    .CK(clk),
    .D(level[11]),
    .Q(\before [11]),
    .QN(_129_),
    .RN(rst_n)
  );
  flop_r_w1 _274_ (
    .CK(clk),
    .D(_003_),
    .Q(warned),
    .QN(_128_),
    .RN(rst_n)
  );
  flop_s_w1 _275_ (
    .CK(clk),
    .D(_000_),
    .Q(alarm_n),
    .QN(alarm),
    .SN(rst_n)
  );
  assign { state[3], state[1] } = { gate_close, gate_open };
endmodule

module tide_log(clk, write, address, value, found);
  input clk;
  wire clk;
  input write;
  wire write;
  input [3:0] address;
  wire [3:0] address;
  input [15:0] value;
  wire [15:0] value;
  output [15:0] found;
  wire [15:0] found;
  wire [15:0] _0000_;
  wire _0001_;
  wire _0002_;
  wire _0003_;
  wire _0004_;
  wire _0005_;
  wire _0006_;
  wire _0007_;
  wire _0008_;
  wire _0009_;
  wire _0010_;
  wire _0011_;
  wire _0012_;
  wire _0013_;
  wire _0014_;
  wire _0015_;
  wire _0016_;
  wire _0017_;
  wire _0018_;
  wire _0019_;
  wire _0020_;
  wire _0021_;
  wire _0022_;
  wire _0023_;
  wire _0024_;
  wire _0025_;
  wire _0026_;
  wire _0027_;
  wire _0028_;
  wire _0029_;
  wire _0030_;
  wire _0031_;
  wire _0032_;
  wire _0033_;
  wire _0034_;
  wire _0035_;
  wire _0036_;
  wire _0037_;
  wire _0038_;
  wire _0039_;
  wire _0040_;
  wire _0041_;
  wire _0042_;
  wire _0043_;
  wire _0044_;
  wire _0045_;
  wire _0046_;
  wire _0047_;
  wire _0048_;
  wire _0049_;
  wire _0050_;
  wire _0051_;
  wire _0052_;
  wire _0053_;
  wire _0054_;
  wire _0055_;
  wire _0056_;
  wire _0057_;
  wire _0058_;
  wire _0059_;
  wire _0060_;
  wire _0061_;
  wire _0062_;
  wire _0063_;
  wire _0064_;
  wire _0065_;
  wire _0066_;
  wire _0067_;
  wire _0068_;
  wire _0069_;
  wire _0070_;
  wire _0071_;
  wire _0072_;
  wire _0073_;
  wire _0074_;
  wire _0075_;
  wire _0076_;
  wire _0077_;
  wire _0078_;
  wire _0079_;
  wire _0080_;
  wire _0081_;
  wire _0082_;
  wire _0083_;
  wire _0084_;
  wire _0085_;
  wire _0086_;
  wire _0087_;
  wire _0088_;
  wire _0089_;
  wire _0090_;
  wire _0091_;
  wire _0092_;
  wire _0093_;
  wire _0094_;
  wire _0095_;
  wire _0096_;
  wire _0097_;
  wire _0098_;
  wire _0099_;
  wire _0100_;
  wire _0101_;
  wire _0102_;
  wire _0103_;
  wire _0104_;
  wire _0105_;
  wire _0106_;
  wire _0107_;
  wire _0108_;
  wire _0109_;
  wire _0110_;
  wire _0111_;
  wire _0112_;
  wire _0113_;
  wire _0114_;
  wire _0115_;
  wire _0116_;
  wire _0117_;
  wire _0118_;
  wire _0119_;
  wire _0120_;
  wire _0121_;
  wire _0122_;
  wire _0123_;
  wire _0124_;
  wire _0125_;
  wire _0126_;
  wire _0127_;
  wire _0128_;
  wire _0129_;
  wire _0130_;
  wire _0131_;
  wire _0132_;
  wire _0133_;
  wire _0134_;
  wire _0135_;
  wire _0136_;
  wire _0137_;
  wire _0138_;
  wire _0139_;
  wire _0140_;
  wire _0141_;
  wire _0142_;
  wire _0143_;
  wire _0144_;
  wire _0145_;
  wire _0146_;
  wire _0147_;
  wire _0148_;
  wire _0149_;
  wire _0150_;
  wire _0151_;
  wire _0152_;
  wire _0153_;
  wire _0154_;
  wire _0155_;
  wire _0156_;
  wire _0157_;
  wire _0158_;
  wire _0159_;
  wire _0160_;
  wire _0161_;
  wire _0162_;
  wire _0163_;
  wire _0164_;
  wire _0165_;
  wire _0166_;
  wire _0167_;
  wire _0168_;
  wire _0169_;
  wire _0170_;
  wire _0171_;
  wire _0172_;
  wire _0173_;
  wire _0174_;
  wire _0175_;
  wire _0176_;
  wire _0177_;
  wire _0178_;
  wire _0179_;
  wire _0180_;
  wire _0181_;
  wire _0182_;
  wire _0183_;
  wire _0184_;
  wire _0185_;
  wire _0186_;
  wire _0187_;
  wire _0188_;
  wire _0189_;
  wire _0190_;
  wire _0191_;
  wire _0192_;
  wire _0193_;
  wire _0194_;
  wire _0195_;
  wire _0196_;
  wire _0197_;
  wire _0198_;
  wire _0199_;
  wire _0200_;
  wire _0201_;
  wire _0202_;
  wire _0203_;
  wire _0204_;
  wire _0205_;
  wire _0206_;
  wire _0207_;
  wire _0208_;
  wire _0209_;
  wire _0210_;
  wire _0211_;
  wire _0212_;
  wire _0213_;
  wire _0214_;
  wire _0215_;
  wire _0216_;
  wire _0217_;
  wire _0218_;
  wire _0219_;
  wire _0220_;
  wire _0221_;
  wire _0222_;
  wire _0223_;
  wire _0224_;
  wire _0225_;
  wire _0226_;
  wire _0227_;
  wire _0228_;
  wire _0229_;
  wire _0230_;
  wire _0231_;
  wire _0232_;
  wire _0233_;
  wire _0234_;
  wire _0235_;
  wire _0236_;
  wire _0237_;
  wire _0238_;
  wire _0239_;
  wire _0240_;
  wire _0241_;
  wire _0242_;
  wire _0243_;
  wire _0244_;
  wire _0245_;
  wire _0246_;
  wire _0247_;
  wire _0248_;
  wire _0249_;
  wire _0250_;
  wire _0251_;
  wire _0252_;
  wire _0253_;
  wire _0254_;
  wire _0255_;
  wire _0256_;
  wire _0257_;
  wire _0258_;
  wire _0259_;
  wire _0260_;
  wire _0261_;
  wire _0262_;
  wire _0263_;
  wire _0264_;
  wire _0265_;
  wire _0266_;
  wire _0267_;
  wire _0268_;
  wire _0269_;
  wire _0270_;
  wire _0271_;
  wire _0272_;
  wire _0273_;
  wire _0274_;
  wire _0275_;
  wire _0276_;
  wire _0277_;
  wire _0278_;
  wire _0279_;
  wire _0280_;
  wire _0281_;
  wire _0282_;
  wire _0283_;
  wire _0284_;
  wire _0285_;
  wire _0286_;
  wire _0287_;
  wire _0288_;
  wire _0289_;
  wire _0290_;
  wire _0291_;
  wire _0292_;
  wire _0293_;
  wire _0294_;
  wire _0295_;
  wire _0296_;
  wire _0297_;
  wire _0298_;
  wire _0299_;
  wire _0300_;
  wire _0301_;
  wire _0302_;
  wire _0303_;
  wire _0304_;
  wire _0305_;
  wire _0306_;
  wire _0307_;
  wire _0308_;
  wire _0309_;
  wire _0310_;
  wire _0311_;
  wire _0312_;
  wire _0313_;
  wire _0314_;
  wire _0315_;
  wire _0316_;
  wire _0317_;
  wire _0318_;
  wire _0319_;
  wire _0320_;
  wire _0321_;
  wire _0322_;
  wire _0323_;
  wire _0324_;
  wire _0325_;
  wire _0326_;
  wire _0327_;
  wire _0328_;
  wire _0329_;
  wire _0330_;
  wire _0331_;
  wire _0332_;
  wire _0333_;
  wire _0334_;
  wire _0335_;
  wire _0336_;
  wire _0337_;
  wire _0338_;
  wire _0339_;
  wire _0340_;
  wire _0341_;
  wire _0342_;
  wire _0343_;
  wire _0344_;
  wire _0345_;
  wire [3:0] _0346_;
  wire [3:0] _0347_;
  wire _0348_;
  wire _0349_;
  wire _0350_;
  wire _0351_;
  wire _0352_;
  wire _0353_;
  wire _0354_;
  wire _0355_;
  wire _0356_;
  wire _0357_;
  wire _0358_;
  wire _0359_;
  wire _0360_;
  wire _0361_;
  wire _0362_;
  wire _0363_;
  wire _0364_;
  wire _0365_;
  wire _0366_;
  wire _0367_;
  wire _0368_;
  wire _0369_;
  wire _0370_;
  wire _0371_;
  wire _0372_;
  wire _0373_;
  wire _0374_;
  wire _0375_;
  wire _0376_;
  wire _0377_;
  wire _0378_;
  wire _0379_;
  wire _0380_;
  wire _0381_;
  wire _0382_;
  wire _0383_;
  wire _0384_;
  wire _0385_;
  wire _0386_;
  wire _0387_;
  wire _0388_;
  wire _0389_;
  wire _0390_;
  wire _0391_;
  wire _0392_;
  wire _0393_;
  wire _0394_;
  wire _0395_;
  wire _0396_;
  wire _0397_;
  wire _0398_;
  wire _0399_;
  wire _0400_;
  wire _0401_;
  wire _0402_;
  wire _0403_;
  wire _0404_;
  wire _0405_;
  wire _0406_;
  wire _0407_;
  wire _0408_;
  wire _0409_;
  wire _0410_;
  wire _0411_;
  wire _0412_;
  wire _0413_;
  wire _0414_;
  wire _0415_;
  wire _0416_;
  wire _0417_;
  wire _0418_;
  wire _0419_;
  wire _0420_;
  wire _0421_;
  wire _0422_;
  wire _0423_;
  wire _0424_;
  wire _0425_;
  wire _0426_;
  wire _0427_;
  wire _0428_;
  wire _0429_;
  wire _0430_;
  wire _0431_;
  wire _0432_;
  wire _0433_;
  wire _0434_;
  wire _0435_;
  wire _0436_;
  wire _0437_;
  wire _0438_;
  wire _0439_;
  wire _0440_;
  wire _0441_;
  wire _0442_;
  wire _0443_;
  wire _0444_;
  wire _0445_;
  wire _0446_;
  wire _0447_;
  wire _0448_;
  wire _0449_;
  wire _0450_;
  wire _0451_;
  wire _0452_;
  wire _0453_;
  wire _0454_;
  wire _0455_;
  wire _0456_;
  wire _0457_;
  wire _0458_;
  wire _0459_;
  wire _0460_;
  wire _0461_;
  wire _0462_;
  wire _0463_;
  wire _0464_;
  wire _0465_;
  wire _0466_;
  wire _0467_;
  wire _0468_;
  wire _0469_;
  wire _0470_;
  wire _0471_;
  wire _0472_;
  wire _0473_;
  wire _0474_;
  wire _0475_;
  wire _0476_;
  wire _0477_;
  wire _0478_;
  wire _0479_;
  wire _0480_;
  wire _0481_;
  wire _0482_;
  wire _0483_;
  wire _0484_;
  wire _0485_;
  wire _0486_;
  wire _0487_;
  wire _0488_;
  wire _0489_;
  wire _0490_;
  wire _0491_;
  wire _0492_;
  wire _0493_;
  wire _0494_;
  wire _0495_;
  wire _0496_;
  wire _0497_;
  wire _0498_;
  wire _0499_;
  wire _0500_;
  wire _0501_;
  wire _0502_;
  wire _0503_;
  wire _0504_;
  wire _0505_;
  wire _0506_;
  wire _0507_;
  wire _0508_;
  wire _0509_;
  wire _0510_;
  wire _0511_;
  wire _0512_;
  wire _0513_;
  wire _0514_;
  wire _0515_;
  wire _0516_;
  wire _0517_;
  wire _0518_;
  wire _0519_;
  wire _0520_;
  wire _0521_;
  wire _0522_;
  wire _0523_;
  wire _0524_;
  wire _0525_;
  wire _0526_;
  wire _0527_;
  wire _0528_;
  wire _0529_;
  wire _0530_;
  wire _0531_;
  wire _0532_;
  wire _0533_;
  wire _0534_;
  wire _0535_;
  wire _0536_;
  wire _0537_;
  wire _0538_;
  wire _0539_;
  wire _0540_;
  wire _0541_;
  wire _0542_;
  wire _0543_;
  wire _0544_;
  wire _0545_;
  wire _0546_;
  wire _0547_;
  wire _0548_;
  wire _0549_;
  wire _0550_;
  wire _0551_;
  wire _0552_;
  wire _0553_;
  wire _0554_;
  wire _0555_;
  wire _0556_;
  wire _0557_;
  wire _0558_;
  wire _0559_;
  wire _0560_;
  wire _0561_;
  wire _0562_;
  wire _0563_;
  wire _0564_;
  wire _0565_;
  wire _0566_;
  wire _0567_;
  wire _0568_;
  wire _0569_;
  wire _0570_;
  wire _0571_;
  wire _0572_;
  wire _0573_;
  wire _0574_;
  wire _0575_;
  wire _0576_;
  wire _0577_;
  wire _0578_;
  wire _0579_;
  wire _0580_;
  wire _0581_;
  wire _0582_;
  wire _0583_;
  wire _0584_;
  wire _0585_;
  wire _0586_;
  wire _0587_;
  wire _0588_;
  wire _0589_;
  wire _0590_;
  wire _0591_;
  wire _0592_;
  wire _0593_;
  wire _0594_;
  wire _0595_;
  wire _0596_;
  wire _0597_;
  wire _0598_;
  wire _0599_;
  wire _0600_;
  wire _0601_;
  wire _0602_;
  wire _0603_;
  wire _0604_;
  wire _0605_;
  wire _0606_;
  wire _0607_;
  wire _0608_;
  wire _0609_;
  wire _0610_;
  wire _0611_;
  wire _0612_;
  wire _0613_;
  wire _0614_;
  wire _0615_;
  wire _0616_;
  wire _0617_;
  wire _0618_;
  wire _0619_;
  wire [3:0] next;
  wire [15:0] \words[0] ;
  wire [15:0] \words[10] ;
  wire [15:0] \words[11] ;
  wire [15:0] \words[12] ;
  wire [15:0] \words[13] ;
  wire [15:0] \words[14] ;
  wire [15:0] \words[15] ;
  wire [15:0] \words[1] ;
  wire [15:0] \words[2] ;
  wire [15:0] \words[3] ;
  wire [15:0] \words[4] ;
  wire [15:0] \words[5] ;
  wire [15:0] \words[6] ;
  wire [15:0] \words[7] ;
  wire [15:0] \words[8] ;
  wire [15:0] \words[9] ;
  inv_w1 _0620_ (
    .A(address[0]),
    .Y(_0020_)
  );
  inv_w1 _0621_ (
    .A(address[1]),
    .Y(_0021_)
  );
  nand2_w1 _0622_ (
    .A(next[0]),
    .B(next[1]),
    .Y(_0029_)
  );
  mux2_w1 _0623_ (
    .A(\words[8] [13]),
    .B(\words[10] [13]),
    .S(address[1]),
    .Y(_0098_)
  );
  mux2_w1 _0624_ (
    .A(\words[4] [13]),
    .B(\words[6] [13]),
    .S(address[1]),
    .Y(_0099_)
  );
  nand2_w1 _0625_ (
    .A(_0020_),
    .B(_0099_),
    .Y(_0100_)
  );
  mux2_w1 _0626_ (
    .A(\words[5] [13]),
    .B(\words[7] [13]),
    .S(address[1]),
    .Y(_0101_)
  );
  mux2_w1 _0627_ (
    .A(\words[1] [13]),
    .B(\words[3] [13]),
    .S(address[1]),
    .Y(_0102_)
  );
  mux2_w1 _0628_ (
    .A(\words[0] [13]),
    .B(\words[2] [13]),
    .S(address[1]),
    .Y(_0103_)
  );
  nand2_w1 _0629_ (
    .A(_0020_),
    .B(_0103_),
    .Y(_0104_)
  );
  mux2_w1 _0630_ (
    .A(\words[13] [13]),
    .B(\words[15] [13]),
    .S(address[1]),
    .Y(_0105_)
  );
  mux2_w1 _0631_ (
    .A(\words[12] [13]),
    .B(\words[14] [13]),
    .S(address[1]),
    .Y(_0106_)
  );
  nand2_w1 _0632_ (
    .A(_0020_),
    .B(_0106_),
    .Y(_0107_)
  );
  nand3_w1 _0633_ (
    .A(write),
    .B(next[0]),
    .C(next[1]),
    .Y(_0030_)
  );
  and_nor21_w1 _0634_ (
    .A(address[0]),
    .B(_0105_),
    .C(_0022_),
    .Y(_0108_)
  );
  and_nor21_w1 _0635_ (
    .A(address[0]),
    .B(_0101_),
    .C(address[3]),
    .Y(_0109_)
  );
  and_nor22_w1 _0636_ (
    .A(_0107_),
    .B(_0108_),
    .C(_0109_),
    .D(_0100_),
    .Y(_0110_)
  );
  nand2_w1 _0637_ (
    .A(_0020_),
    .B(_0098_),
    .Y(_0111_)
  );
  and_nor21_w1 _0638_ (
    .A(address[0]),
    .B(_0097_),
    .C(_0022_),
    .Y(_0112_)
  );
  and_nor21_w1 _0639_ (
    .A(address[0]),
    .B(_0102_),
    .C(address[3]),
    .Y(_0113_)
  );
  and_nor22_w1 _0640_ (
    .A(_0111_),
    .B(_0112_),
    .C(_0113_),
    .D(_0104_),
    .Y(_0114_)
  );
  mux2_w1 _0641_ (
    .A(_0110_),
    .B(_0114_),
    .S(_0023_),
    .Y(_0000_[13])
  );
  mux2_w1 _0642_ (
    .A(\words[8] [12]),
    .B(\words[10] [12]),
    .S(address[1]),
    .Y(_0115_)
  );
  nand2_w1 _0643_ (
    .A(_0020_),
    .B(_0115_),
    .Y(_0116_)
  );
  nor2_w1 _0644_ (
    .A(_0027_),
    .B(_0030_),
    .Y(_0013_)
  );
  mux2_w1 _0645_ (
    .A(\words[9] [12]),
    .B(\words[11] [12]),
    .S(address[1]),
    .Y(_0117_)
  );
  and_nor21_w1 _0646_ (
    .A(address[0]),
    .B(_0117_),
    .C(_0022_),
    .Y(_0118_)
  );
  mux2_w1 _0647_ (
    .A(\words[0] [12]),
    .B(\words[2] [12]),
    .S(address[1]),
    .Y(_0119_)
  );
  nand2_w1 _0648_ (
    .A(_0020_),
    .B(_0119_),
    .Y(_0120_)
  );
  mux2_w1 _0649_ (
    .A(\words[1] [12]),
    .B(\words[3] [12]),
    .S(address[1]),
    .Y(_0121_)
  );
  and_nor21_w1 _0650_ (
    .A(address[0]),
    .B(_0121_),
    .C(address[3]),
    .Y(_0122_)
  );
  and_nor22_w1 _0651_ (
    .A(_0116_),
    .B(_0118_),
    .C(_0120_),
    .D(_0122_),
    .Y(_0123_)
  );
  mux2_w1 _0652_ (
    .A(\words[13] [12]),
    .B(\words[15] [12]),
    .S(address[1]),
    .Y(_0124_)
  );
  nand2_w1 _0653_ (
    .A(address[0]),
    .B(_0124_),
    .Y(_0125_)
  );
  mux2_w1 _0654_ (
    .A(\words[12] [12]),
    .B(\words[14] [12]),
    .S(address[1]),
    .Y(_0126_)
  );
  nand2_w1 _0655_ (
    .A(next[2]),
    .B(_0026_),
    .Y(_0031_)
  );
  and_nor21_w1 _0656_ (
    .A(_0020_),
    .B(_0126_),
    .C(_0022_),
    .Y(_0127_)
  );
  mux2_w1 _0657_ (
    .A(\words[4] [12]),
    .B(\words[6] [12]),
    .S(address[1]),
    .Y(_0128_)
  );
  nand2_w1 _0658_ (
    .A(_0020_),
    .B(_0128_),
    .Y(_0129_)
  );
  mux2_w1 _0659_ (
    .A(\words[5] [12]),
    .B(\words[7] [12]),
    .S(address[1]),
    .Y(_0130_)
  );
  and_nor21_w1 _0660_ (
    .A(address[0]),
    .B(_0130_),
    .C(address[3]),
    .Y(_0131_)
  );
  and_nor22_w1 _0661_ (
    .A(_0125_),
    .B(_0127_),
    .C(_0129_),
    .D(_0131_),
    .Y(_0132_)
  );
  mux2_w1 _0662_ (
    .A(_0123_),
    .B(_0132_),
    .S(address[2]),
    .Y(_0000_[12])
  );
  mux2_w1 _0663_ (
    .A(\words[8] [11]),
    .B(\words[10] [11]),
    .S(address[1]),
    .Y(_0133_)
  );
  nand2_w1 _0664_ (
    .A(_0020_),
    .B(_0133_),
    .Y(_0134_)
  );
  mux2_w1 _0665_ (
    .A(\words[9] [11]),
    .B(\words[11] [11]),
    .S(address[1]),
    .Y(_0135_)
  );
  nor2_w1 _0666_ (
    .A(_0028_),
    .B(_0031_),
    .Y(_0011_)
  );
  and_nor21_w1 _0667_ (
    .A(address[0]),
    .B(_0135_),
    .C(_0022_),
    .Y(_0136_)
  );
  mux2_w1 _0668_ (
    .A(\words[0] [11]),
    .B(\words[2] [11]),
    .S(address[1]),
    .Y(_0137_)
  );
  nand2_w1 _0669_ (
    .A(_0020_),
    .B(_0137_),
    .Y(_0138_)
  );
  mux2_w1 _0670_ (
    .A(\words[1] [11]),
    .B(\words[3] [11]),
    .S(address[1]),
    .Y(_0139_)
  );
  and_nor21_w1 _0671_ (
    .A(address[0]),
    .B(_0139_),
    .C(address[3]),
    .Y(_0140_)
  );
  and_nor22_w1 _0672_ (
    .A(_0134_),
    .B(_0136_),
    .C(_0138_),
    .D(_0140_),
    .Y(_0141_)
  );
  nand2_w1 _0673_ (
    .A(_0022_),
    .B(\words[5] [11]),
    .Y(_0142_)
  );
  and_nor21_w1 _0674_ (
    .A(address[3]),
    .B(\words[13] [11]),
    .C(address[1]),
    .Y(_0143_)
  );
  nand2_w1 _0675_ (
    .A(\words[7] [11]),
    .B(_0022_),
    .Y(_0144_)
  );
  and_nor21_w1 _0676_ (
    .A(address[3]),
    .B(\words[15] [11]),
    .C(_0021_),
    .Y(_0145_)
  );
  nor2_w1 _0677_ (
    .A(_0030_),
    .B(_0031_),
    .Y(_0009_)
  );
  and_nor22_w1 _0678_ (
    .A(_0142_),
    .B(_0143_),
    .C(_0144_),
    .D(_0145_),
    .Y(_0146_)
  );
  nand2_w1 _0679_ (
    .A(_0022_),
    .B(\words[4] [11]),
    .Y(_0147_)
  );
  and_nor21_w1 _0680_ (
    .A(address[3]),
    .B(\words[12] [11]),
    .C(address[1]),
    .Y(_0148_)
  );
  nand2_w1 _0681_ (
    .A(\words[6] [11]),
    .B(_0022_),
    .Y(_0149_)
  );
  and_nor21_w1 _0682_ (
    .A(address[3]),
    .B(\words[14] [11]),
    .C(_0021_),
    .Y(_0150_)
  );
  and_nor22_w1 _0683_ (
    .A(_0147_),
    .B(_0148_),
    .C(_0149_),
    .D(_0150_),
    .Y(_0151_)
  );
  mux2_w1 _0684_ (
    .A(_0146_),
    .B(_0151_),
    .S(_0020_),
    .Y(_0152_)
  );
  mux2_w1 _0685_ (
    .A(_0141_),
    .B(_0152_),
    .S(address[2]),
    .Y(_0000_[11])
  );
  nor2_w1 _0686_ (
    .A(address[1]),
    .B(\words[5] [10]),
    .Y(_0153_)
  );
  mux2_w1 _0687_ (
    .A(\words[4] [10]),
    .B(\words[6] [10]),
    .S(address[1]),
    .Y(_0154_)
  );
  or2_w1 _0688_ (
    .A(next[2]),
    .B(_0026_),
    .Y(_0032_)
  );
  nand2_w1 _0689_ (
    .A(_0021_),
    .B(\words[8] [10]),
    .Y(_0155_)
  );
  and_nor21_w1 _0690_ (
    .A(address[1]),
    .B(\words[10] [10]),
    .C(address[0]),
    .Y(_0156_)
  );
  nand2_w1 _0691_ (
    .A(address[1]),
    .B(\words[11] [10]),
    .Y(_0157_)
  );
  and_nor21_w1 _0692_ (
    .A(_0021_),
    .B(\words[9] [10]),
    .C(_0020_),
    .Y(_0158_)
  );
  and_nor22_w1 _0693_ (
    .A(_0155_),
    .B(_0156_),
    .C(_0157_),
    .D(_0158_),
    .Y(_0159_)
  );
  mux2_w1 _0694_ (
    .A(\words[1] [10]),
    .B(\words[3] [10]),
    .S(address[1]),
    .Y(_0160_)
  );
  mux2_w1 _0695_ (
    .A(\words[0] [10]),
    .B(\words[2] [10]),
    .S(address[1]),
    .Y(_0161_)
  );
  mux2_w1 _0696_ (
    .A(_0160_),
    .B(_0161_),
    .S(_0020_),
    .Y(_0162_)
  );
  mux2_w1 _0697_ (
    .A(\words[13] [10]),
    .B(\words[15] [10]),
    .S(address[1]),
    .Y(_0163_)
  );
  nand2_w1 _0698_ (
    .A(address[0]),
    .B(_0163_),
    .Y(_0164_)
  );
  nor2_w1 _0699_ (
    .A(_0028_),
    .B(_0032_),
    .Y(_0007_)
  );
  mux2_w1 _0700_ (
    .A(\words[12] [10]),
    .B(\words[14] [10]),
    .S(address[1]),
    .Y(_0165_)
  );
  and_nor21_w1 _0701_ (
    .A(_0020_),
    .B(_0165_),
    .C(_0023_),
    .Y(_0166_)
  );
  and_nor21_w1 _0702_ (
    .A(_0164_),
    .B(_0166_),
    .C(_0022_),
    .Y(_0167_)
  );
  or_nand21_w1 _0703_ (
    .A(address[2]),
    .B(_0159_),
    .C(_0167_),
    .Y(_0168_)
  );
  or_nand21_w1 _0704_ (
    .A(_0021_),
    .B(\words[7] [10]),
    .C(address[0]),
    .Y(_0169_)
  );
  and_nor21_w1 _0705_ (
    .A(_0020_),
    .B(_0154_),
    .C(_0023_),
    .Y(_0170_)
  );
  or_nand21_w1 _0706_ (
    .A(_0153_),
    .B(_0169_),
    .C(_0170_),
    .Y(_0171_)
  );
  or_nand21_w1 _0707_ (
    .A(address[2]),
    .B(_0162_),
    .C(_0171_),
    .Y(_0172_)
  );
  or_nand21_w1 _0708_ (
    .A(address[3]),
    .B(_0172_),
    .C(_0168_),
    .Y(_0000_[10])
  );
  nor2_w1 _0709_ (
    .A(address[1]),
    .B(\words[5] [9]),
    .Y(_0173_)
  );
  nor2_w1 _0710_ (
    .A(_0030_),
    .B(_0032_),
    .Y(_0005_)
  );
  mux2_w1 _0711_ (
    .A(\words[4] [9]),
    .B(\words[6] [9]),
    .S(address[1]),
    .Y(_0174_)
  );
  nand2_w1 _0712_ (
    .A(\words[8] [9]),
    .B(_0021_),
    .Y(_0175_)
  );
  and_nor21_w1 _0713_ (
    .A(address[1]),
    .B(\words[10] [9]),
    .C(address[0]),
    .Y(_0176_)
  );
  nand2_w1 _0714_ (
    .A(address[1]),
    .B(\words[11] [9]),
    .Y(_0177_)
  );
  and_nor21_w1 _0715_ (
    .A(\words[9] [9]),
    .B(_0021_),
    .C(_0020_),
    .Y(_0178_)
  );
  and_nor22_w1 _0716_ (
    .A(_0175_),
    .B(_0176_),
    .C(_0177_),
    .D(_0178_),
    .Y(_0179_)
  );
  mux2_w1 _0717_ (
    .A(\words[1] [9]),
    .B(\words[3] [9]),
    .S(address[1]),
    .Y(_0180_)
  );
  mux2_w1 _0718_ (
    .A(\words[0] [9]),
    .B(\words[2] [9]),
    .S(address[1]),
    .Y(_0181_)
  );
  mux2_w1 _0719_ (
    .A(_0180_),
    .B(_0181_),
    .S(_0020_),
    .Y(_0182_)
  );
  mux2_w1 _0720_ (
    .A(\words[13] [9]),
    .B(\words[15] [9]),
    .S(address[1]),
    .Y(_0183_)
  );
  nand2_w1 _0721_ (
    .A(next[2]),
    .B(next[3]),
    .Y(_0033_)
  );
  mux2_w1 _0722_ (
    .A(\words[12] [9]),
    .B(\words[14] [9]),
    .S(address[1]),
    .Y(_0184_)
  );
  nand2_w1 _0723_ (
    .A(_0020_),
    .B(_0184_),
    .Y(_0185_)
  );
  nand2_w1 _0724_ (
    .A(address[2]),
    .B(_0185_),
    .Y(_0186_)
  );
  and_nor21_w1 _0725_ (
    .A(address[0]),
    .B(_0183_),
    .C(_0186_),
    .Y(_0187_)
  );
  or_nand21_w1 _0726_ (
    .A(address[2]),
    .B(_0179_),
    .C(address[3]),
    .Y(_0188_)
  );
  or_nand21_w1 _0727_ (
    .A(_0021_),
    .B(\words[7] [9]),
    .C(address[0]),
    .Y(_0189_)
  );
  and_nor21_w1 _0728_ (
    .A(_0020_),
    .B(_0174_),
    .C(_0023_),
    .Y(_0190_)
  );
  or_nand21_w1 _0729_ (
    .A(_0173_),
    .B(_0189_),
    .C(_0190_),
    .Y(_0191_)
  );
  or_nand21_w1 _0730_ (
    .A(address[2]),
    .B(_0182_),
    .C(_0191_),
    .Y(_0192_)
  );
  or_nand22_w1 _0731_ (
    .A(_0187_),
    .B(_0188_),
    .C(_0192_),
    .D(address[3]),
    .Y(_0000_[9])
  );
  inv_w1 _0732_ (
    .A(address[3]),
    .Y(_0022_)
  );
  nor2_w1 _0733_ (
    .A(_0028_),
    .B(_0033_),
    .Y(_0003_)
  );
  mux2_w1 _0734_ (
    .A(\words[8] [8]),
    .B(\words[10] [8]),
    .S(address[1]),
    .Y(_0193_)
  );
  nand2_w1 _0735_ (
    .A(_0020_),
    .B(_0193_),
    .Y(_0194_)
  );
  mux2_w1 _0736_ (
    .A(\words[9] [8]),
    .B(\words[11] [8]),
    .S(address[1]),
    .Y(_0195_)
  );
  and_nor21_w1 _0737_ (
    .A(address[0]),
    .B(_0195_),
    .C(_0022_),
    .Y(_0196_)
  );
  mux2_w1 _0738_ (
    .A(\words[0] [8]),
    .B(\words[2] [8]),
    .S(address[1]),
    .Y(_0197_)
  );
  nand2_w1 _0739_ (
    .A(_0020_),
    .B(_0197_),
    .Y(_0198_)
  );
  mux2_w1 _0740_ (
    .A(\words[1] [8]),
    .B(\words[3] [8]),
    .S(address[1]),
    .Y(_0199_)
  );
  and_nor21_w1 _0741_ (
    .A(address[0]),
    .B(_0199_),
    .C(address[3]),
    .Y(_0200_)
  );
  and_nor22_w1 _0742_ (
    .A(_0194_),
    .B(_0196_),
    .C(_0198_),
    .D(_0200_),
    .Y(_0201_)
  );
  nand2_w1 _0743_ (
    .A(\words[5] [8]),
    .B(_0022_),
    .Y(_0202_)
  );
  nor2_w1 _0744_ (
    .A(_0030_),
    .B(_0033_),
    .Y(_0001_)
  );
  and_nor21_w1 _0745_ (
    .A(address[3]),
    .B(\words[13] [8]),
    .C(address[1]),
    .Y(_0203_)
  );
  nand2_w1 _0746_ (
    .A(_0022_),
    .B(\words[7] [8]),
    .Y(_0204_)
  );
  and_nor21_w1 _0747_ (
    .A(address[3]),
    .B(\words[15] [8]),
    .C(_0021_),
    .Y(_0205_)
  );
  and_nor22_w1 _0748_ (
    .A(_0202_),
    .B(_0203_),
    .C(_0204_),
    .D(_0205_),
    .Y(_0206_)
  );
  nand2_w1 _0749_ (
    .A(\words[4] [8]),
    .B(_0022_),
    .Y(_0207_)
  );
  and_nor21_w1 _0750_ (
    .A(address[3]),
    .B(\words[12] [8]),
    .C(address[1]),
    .Y(_0208_)
  );
  nand2_w1 _0751_ (
    .A(_0022_),
    .B(\words[6] [8]),
    .Y(_0209_)
  );
  and_nor21_w1 _0752_ (
    .A(address[3]),
    .B(\words[14] [8]),
    .C(_0021_),
    .Y(_0210_)
  );
  and_nor22_w1 _0753_ (
    .A(_0207_),
    .B(_0208_),
    .C(_0209_),
    .D(_0210_),
    .Y(_0211_)
  );
  mux2_w1 _0754_ (
    .A(_0206_),
    .B(_0211_),
    .S(_0020_),
    .Y(_0212_)
  );
  mux2_w1 _0755_ (
    .A(\words[9] [15]),
    .B(\words[11] [15]),
    .S(address[1]),
    .Y(_0034_)
  );
  mux2_w1 _0756_ (
    .A(_0201_),
    .B(_0212_),
    .S(address[2]),
    .Y(_0000_[8])
  );
  mux2_w1 _0757_ (
    .A(\words[8] [7]),
    .B(\words[10] [7]),
    .S(address[1]),
    .Y(_0213_)
  );
  nand2_w1 _0758_ (
    .A(_0020_),
    .B(_0213_),
    .Y(_0214_)
  );
  mux2_w1 _0759_ (
    .A(\words[9] [7]),
    .B(\words[11] [7]),
    .S(address[1]),
    .Y(_0215_)
  );
  and_nor21_w1 _0760_ (
    .A(address[0]),
    .B(_0215_),
    .C(_0022_),
    .Y(_0216_)
  );
  mux2_w1 _0761_ (
    .A(\words[0] [7]),
    .B(\words[2] [7]),
    .S(address[1]),
    .Y(_0217_)
  );
  nand2_w1 _0762_ (
    .A(_0020_),
    .B(_0217_),
    .Y(_0218_)
  );
  mux2_w1 _0763_ (
    .A(\words[1] [7]),
    .B(\words[3] [7]),
    .S(address[1]),
    .Y(_0219_)
  );
  and_nor21_w1 _0764_ (
    .A(address[0]),
    .B(_0219_),
    .C(address[3]),
    .Y(_0220_)
  );
  and_nor22_w1 _0765_ (
    .A(_0214_),
    .B(_0216_),
    .C(_0218_),
    .D(_0220_),
    .Y(_0221_)
  );
  mux2_w1 _0766_ (
    .A(\words[8] [15]),
    .B(\words[10] [15]),
    .S(address[1]),
    .Y(_0035_)
  );
  nand2_w1 _0767_ (
    .A(_0021_),
    .B(\words[12] [7]),
    .Y(_0222_)
  );
  and_nor21_w1 _0768_ (
    .A(address[1]),
    .B(\words[14] [7]),
    .C(address[0]),
    .Y(_0223_)
  );
  nand2_w1 _0769_ (
    .A(address[1]),
    .B(\words[15] [7]),
    .Y(_0224_)
  );
  and_nor21_w1 _0770_ (
    .A(_0021_),
    .B(\words[13] [7]),
    .C(_0020_),
    .Y(_0225_)
  );
  and_nor22_w1 _0771_ (
    .A(_0222_),
    .B(_0223_),
    .C(_0224_),
    .D(_0225_),
    .Y(_0226_)
  );
  nand2_w1 _0772_ (
    .A(\words[6] [7]),
    .B(address[1]),
    .Y(_0227_)
  );
  and_nor21_w1 _0773_ (
    .A(_0021_),
    .B(\words[4] [7]),
    .C(address[0]),
    .Y(_0228_)
  );
  nand2_w1 _0774_ (
    .A(\words[7] [7]),
    .B(address[1]),
    .Y(_0229_)
  );
  and_nor21_w1 _0775_ (
    .A(_0021_),
    .B(\words[5] [7]),
    .C(_0020_),
    .Y(_0230_)
  );
  and_nor22_w1 _0776_ (
    .A(_0227_),
    .B(_0228_),
    .C(_0229_),
    .D(_0230_),
    .Y(_0231_)
  );
  nand2_w1 _0777_ (
    .A(_0020_),
    .B(_0035_),
    .Y(_0036_)
  );
  mux2_w1 _0778_ (
    .A(_0226_),
    .B(_0231_),
    .S(_0022_),
    .Y(_0232_)
  );
  mux2_w1 _0779_ (
    .A(_0221_),
    .B(_0232_),
    .S(address[2]),
    .Y(_0000_[7])
  );
  nor2_w1 _0780_ (
    .A(address[1]),
    .B(\words[5] [6]),
    .Y(_0233_)
  );
  mux2_w1 _0781_ (
    .A(\words[4] [6]),
    .B(\words[6] [6]),
    .S(address[1]),
    .Y(_0234_)
  );
  nand2_w1 _0782_ (
    .A(_0021_),
    .B(\words[8] [6]),
    .Y(_0235_)
  );
  and_nor21_w1 _0783_ (
    .A(address[1]),
    .B(\words[10] [6]),
    .C(address[0]),
    .Y(_0236_)
  );
  nand2_w1 _0784_ (
    .A(address[1]),
    .B(\words[11] [6]),
    .Y(_0237_)
  );
  and_nor21_w1 _0785_ (
    .A(_0021_),
    .B(\words[9] [6]),
    .C(_0020_),
    .Y(_0238_)
  );
  and_nor22_w1 _0786_ (
    .A(_0235_),
    .B(_0236_),
    .C(_0237_),
    .D(_0238_),
    .Y(_0239_)
  );
  mux2_w1 _0787_ (
    .A(\words[1] [6]),
    .B(\words[3] [6]),
    .S(address[1]),
    .Y(_0240_)
  );
  and_nor21_w1 _0788_ (
    .A(address[0]),
    .B(_0034_),
    .C(_0022_),
    .Y(_0037_)
  );
  mux2_w1 _0789_ (
    .A(\words[0] [6]),
    .B(\words[2] [6]),
    .S(address[1]),
    .Y(_0241_)
  );
  mux2_w1 _0790_ (
    .A(_0240_),
    .B(_0241_),
    .S(_0020_),
    .Y(_0242_)
  );
  mux2_w1 _0791_ (
    .A(\words[13] [6]),
    .B(\words[15] [6]),
    .S(address[1]),
    .Y(_0243_)
  );
  nand2_w1 _0792_ (
    .A(address[0]),
    .B(_0243_),
    .Y(_0244_)
  );
  mux2_w1 _0793_ (
    .A(\words[12] [6]),
    .B(\words[14] [6]),
    .S(address[1]),
    .Y(_0245_)
  );
  and_nor21_w1 _0794_ (
    .A(_0020_),
    .B(_0245_),
    .C(_0023_),
    .Y(_0246_)
  );
  and_nor21_w1 _0795_ (
    .A(_0244_),
    .B(_0246_),
    .C(_0022_),
    .Y(_0247_)
  );
  or_nand21_w1 _0796_ (
    .A(address[2]),
    .B(_0239_),
    .C(_0247_),
    .Y(_0248_)
  );
  or_nand21_w1 _0797_ (
    .A(_0021_),
    .B(\words[7] [6]),
    .C(address[0]),
    .Y(_0249_)
  );
  and_nor21_w1 _0798_ (
    .A(_0020_),
    .B(_0234_),
    .C(_0023_),
    .Y(_0250_)
  );
  mux2_w1 _0799_ (
    .A(\words[1] [15]),
    .B(\words[3] [15]),
    .S(address[1]),
    .Y(_0038_)
  );
  or_nand21_w1 _0800_ (
    .A(_0233_),
    .B(_0249_),
    .C(_0250_),
    .Y(_0251_)
  );
  or_nand21_w1 _0801_ (
    .A(address[2]),
    .B(_0242_),
    .C(_0251_),
    .Y(_0252_)
  );
  or_nand21_w1 _0802_ (
    .A(address[3]),
    .B(_0252_),
    .C(_0248_),
    .Y(_0000_[6])
  );
  nor2_w1 _0803_ (
    .A(address[1]),
    .B(\words[5] [5]),
    .Y(_0253_)
  );
  nand2_w1 _0804_ (
    .A(address[1]),
    .B(\words[6] [5]),
    .Y(_0254_)
  );
  nand2_w1 _0805_ (
    .A(_0021_),
    .B(\words[4] [5]),
    .Y(_0255_)
  );
  nand2_w1 _0806_ (
    .A(\words[8] [5]),
    .B(_0021_),
    .Y(_0256_)
  );
  and_nor21_w1 _0807_ (
    .A(address[1]),
    .B(\words[10] [5]),
    .C(address[0]),
    .Y(_0257_)
  );
  nand2_w1 _0808_ (
    .A(address[1]),
    .B(\words[11] [5]),
    .Y(_0258_)
  );
  and_nor21_w1 _0809_ (
    .A(\words[9] [5]),
    .B(_0021_),
    .C(_0020_),
    .Y(_0259_)
  );
  mux2_w1 _0810_ (
    .A(\words[0] [15]),
    .B(\words[2] [15]),
    .S(address[1]),
    .Y(_0039_)
  );
  and_nor22_w1 _0811_ (
    .A(_0256_),
    .B(_0257_),
    .C(_0258_),
    .D(_0259_),
    .Y(_0260_)
  );
  mux2_w1 _0812_ (
    .A(\words[1] [5]),
    .B(\words[3] [5]),
    .S(address[1]),
    .Y(_0261_)
  );
  mux2_w1 _0813_ (
    .A(\words[0] [5]),
    .B(\words[2] [5]),
    .S(address[1]),
    .Y(_0262_)
  );
  mux2_w1 _0814_ (
    .A(_0261_),
    .B(_0262_),
    .S(_0020_),
    .Y(_0263_)
  );
  mux2_w1 _0815_ (
    .A(\words[13] [5]),
    .B(\words[15] [5]),
    .S(address[1]),
    .Y(_0264_)
  );
  mux2_w1 _0816_ (
    .A(\words[12] [5]),
    .B(\words[14] [5]),
    .S(address[1]),
    .Y(_0265_)
  );
  nand2_w1 _0817_ (
    .A(_0020_),
    .B(_0265_),
    .Y(_0266_)
  );
  nand2_w1 _0818_ (
    .A(address[2]),
    .B(_0266_),
    .Y(_0267_)
  );
  and_nor21_w1 _0819_ (
    .A(address[0]),
    .B(_0264_),
    .C(_0267_),
    .Y(_0268_)
  );
  or_nand21_w1 _0820_ (
    .A(address[2]),
    .B(_0260_),
    .C(address[3]),
    .Y(_0269_)
  );
  nand2_w1 _0821_ (
    .A(_0020_),
    .B(_0039_),
    .Y(_0040_)
  );
  or_nand21_w1 _0822_ (
    .A(_0021_),
    .B(\words[7] [5]),
    .C(address[0]),
    .Y(_0270_)
  );
  and_nor21_w1 _0823_ (
    .A(_0254_),
    .B(_0255_),
    .C(address[0]),
    .Y(_0271_)
  );
  or_nand21_w1 _0824_ (
    .A(_0253_),
    .B(_0270_),
    .C(address[2]),
    .Y(_0272_)
  );
  or_nand22_w1 _0825_ (
    .A(address[2]),
    .B(_0263_),
    .C(_0271_),
    .D(_0272_),
    .Y(_0273_)
  );
  or_nand22_w1 _0826_ (
    .A(_0268_),
    .B(_0269_),
    .C(_0273_),
    .D(address[3]),
    .Y(_0000_[5])
  );
  mux2_w1 _0827_ (
    .A(\words[8] [4]),
    .B(\words[10] [4]),
    .S(address[1]),
    .Y(_0274_)
  );
  nand2_w1 _0828_ (
    .A(_0020_),
    .B(_0274_),
    .Y(_0275_)
  );
  mux2_w1 _0829_ (
    .A(\words[9] [4]),
    .B(\words[11] [4]),
    .S(address[1]),
    .Y(_0276_)
  );
  and_nor21_w1 _0830_ (
    .A(address[0]),
    .B(_0276_),
    .C(_0022_),
    .Y(_0277_)
  );
  mux2_w1 _0831_ (
    .A(\words[0] [4]),
    .B(\words[2] [4]),
    .S(address[1]),
    .Y(_0278_)
  );
  and_nor21_w1 _0832_ (
    .A(address[0]),
    .B(_0038_),
    .C(address[3]),
    .Y(_0041_)
  );
  nand2_w1 _0833_ (
    .A(_0020_),
    .B(_0278_),
    .Y(_0279_)
  );
  mux2_w1 _0834_ (
    .A(\words[1] [4]),
    .B(\words[3] [4]),
    .S(address[1]),
    .Y(_0280_)
  );
  and_nor21_w1 _0835_ (
    .A(address[0]),
    .B(_0280_),
    .C(address[3]),
    .Y(_0281_)
  );
  and_nor22_w1 _0836_ (
    .A(_0275_),
    .B(_0277_),
    .C(_0279_),
    .D(_0281_),
    .Y(_0282_)
  );
  mux2_w1 _0837_ (
    .A(\words[13] [4]),
    .B(\words[15] [4]),
    .S(address[1]),
    .Y(_0283_)
  );
  nand2_w1 _0838_ (
    .A(address[0]),
    .B(_0283_),
    .Y(_0284_)
  );
  mux2_w1 _0839_ (
    .A(\words[12] [4]),
    .B(\words[14] [4]),
    .S(address[1]),
    .Y(_0285_)
  );
  and_nor21_w1 _0840_ (
    .A(_0020_),
    .B(_0285_),
    .C(_0022_),
    .Y(_0286_)
  );
  mux2_w1 _0841_ (
    .A(\words[4] [4]),
    .B(\words[6] [4]),
    .S(address[1]),
    .Y(_0287_)
  );
  nand2_w1 _0842_ (
    .A(_0020_),
    .B(_0287_),
    .Y(_0288_)
  );
  inv_w1 _0843_ (
    .A(address[2]),
    .Y(_0023_)
  );
  and_nor22_w1 _0844_ (
    .A(_0036_),
    .B(_0037_),
    .C(_0040_),
    .D(_0041_),
    .Y(_0042_)
  );
  mux2_w1 _0845_ (
    .A(\words[5] [4]),
    .B(\words[7] [4]),
    .S(address[1]),
    .Y(_0289_)
  );
  and_nor21_w1 _0846_ (
    .A(address[0]),
    .B(_0289_),
    .C(address[3]),
    .Y(_0290_)
  );
  and_nor22_w1 _0847_ (
    .A(_0284_),
    .B(_0286_),
    .C(_0288_),
    .D(_0290_),
    .Y(_0291_)
  );
  mux2_w1 _0848_ (
    .A(_0282_),
    .B(_0291_),
    .S(address[2]),
    .Y(_0000_[4])
  );
  mux2_w1 _0849_ (
    .A(\words[9] [3]),
    .B(\words[11] [3]),
    .S(address[1]),
    .Y(_0292_)
  );
  mux2_w1 _0850_ (
    .A(\words[8] [3]),
    .B(\words[10] [3]),
    .S(address[1]),
    .Y(_0293_)
  );
  mux2_w1 _0851_ (
    .A(\words[4] [3]),
    .B(\words[6] [3]),
    .S(address[1]),
    .Y(_0294_)
  );
  nand2_w1 _0852_ (
    .A(_0020_),
    .B(_0294_),
    .Y(_0295_)
  );
  mux2_w1 _0853_ (
    .A(\words[5] [3]),
    .B(\words[7] [3]),
    .S(address[1]),
    .Y(_0296_)
  );
  mux2_w1 _0854_ (
    .A(\words[1] [3]),
    .B(\words[3] [3]),
    .S(address[1]),
    .Y(_0297_)
  );
  nand2_w1 _0855_ (
    .A(\words[5] [15]),
    .B(_0022_),
    .Y(_0043_)
  );
  mux2_w1 _0856_ (
    .A(\words[0] [3]),
    .B(\words[2] [3]),
    .S(address[1]),
    .Y(_0298_)
  );
  nand2_w1 _0857_ (
    .A(_0020_),
    .B(_0298_),
    .Y(_0299_)
  );
  mux2_w1 _0858_ (
    .A(\words[13] [3]),
    .B(\words[15] [3]),
    .S(address[1]),
    .Y(_0300_)
  );
  mux2_w1 _0859_ (
    .A(\words[12] [3]),
    .B(\words[14] [3]),
    .S(address[1]),
    .Y(_0301_)
  );
  nand2_w1 _0860_ (
    .A(_0020_),
    .B(_0301_),
    .Y(_0302_)
  );
  and_nor21_w1 _0861_ (
    .A(address[0]),
    .B(_0300_),
    .C(_0022_),
    .Y(_0303_)
  );
  and_nor21_w1 _0862_ (
    .A(address[0]),
    .B(_0296_),
    .C(address[3]),
    .Y(_0304_)
  );
  and_nor22_w1 _0863_ (
    .A(_0302_),
    .B(_0303_),
    .C(_0304_),
    .D(_0295_),
    .Y(_0305_)
  );
  nand2_w1 _0864_ (
    .A(_0020_),
    .B(_0293_),
    .Y(_0306_)
  );
  and_nor21_w1 _0865_ (
    .A(address[0]),
    .B(_0292_),
    .C(_0022_),
    .Y(_0307_)
  );
  and_nor21_w1 _0866_ (
    .A(address[3]),
    .B(\words[13] [15]),
    .C(address[1]),
    .Y(_0044_)
  );
  and_nor21_w1 _0867_ (
    .A(address[0]),
    .B(_0297_),
    .C(address[3]),
    .Y(_0308_)
  );
  and_nor22_w1 _0868_ (
    .A(_0306_),
    .B(_0307_),
    .C(_0308_),
    .D(_0299_),
    .Y(_0309_)
  );
  mux2_w1 _0869_ (
    .A(_0305_),
    .B(_0309_),
    .S(_0023_),
    .Y(_0000_[3])
  );
  mux2_w1 _0870_ (
    .A(\words[8] [2]),
    .B(\words[10] [2]),
    .S(address[1]),
    .Y(_0310_)
  );
  nand2_w1 _0871_ (
    .A(_0020_),
    .B(_0310_),
    .Y(_0311_)
  );
  mux2_w1 _0872_ (
    .A(\words[9] [2]),
    .B(\words[11] [2]),
    .S(address[1]),
    .Y(_0312_)
  );
  and_nor21_w1 _0873_ (
    .A(address[0]),
    .B(_0312_),
    .C(_0022_),
    .Y(_0313_)
  );
  mux2_w1 _0874_ (
    .A(\words[0] [2]),
    .B(\words[2] [2]),
    .S(address[1]),
    .Y(_0314_)
  );
  nand2_w1 _0875_ (
    .A(_0020_),
    .B(_0314_),
    .Y(_0315_)
  );
  mux2_w1 _0876_ (
    .A(\words[1] [2]),
    .B(\words[3] [2]),
    .S(address[1]),
    .Y(_0316_)
  );
  nand2_w1 _0877_ (
    .A(_0022_),
    .B(\words[7] [15]),
    .Y(_0045_)
  );
  and_nor21_w1 _0878_ (
    .A(address[0]),
    .B(_0316_),
    .C(address[3]),
    .Y(_0317_)
  );
  and_nor22_w1 _0879_ (
    .A(_0311_),
    .B(_0313_),
    .C(_0315_),
    .D(_0317_),
    .Y(_0318_)
  );
  mux2_w1 _0880_ (
    .A(\words[13] [2]),
    .B(\words[15] [2]),
    .S(address[1]),
    .Y(_0319_)
  );
  nand2_w1 _0881_ (
    .A(address[0]),
    .B(_0319_),
    .Y(_0320_)
  );
  mux2_w1 _0882_ (
    .A(\words[12] [2]),
    .B(\words[14] [2]),
    .S(address[1]),
    .Y(_0321_)
  );
  and_nor21_w1 _0883_ (
    .A(_0020_),
    .B(_0321_),
    .C(_0022_),
    .Y(_0322_)
  );
  mux2_w1 _0884_ (
    .A(\words[4] [2]),
    .B(\words[6] [2]),
    .S(address[1]),
    .Y(_0323_)
  );
  nand2_w1 _0885_ (
    .A(_0020_),
    .B(_0323_),
    .Y(_0324_)
  );
  mux2_w1 _0886_ (
    .A(\words[5] [2]),
    .B(\words[7] [2]),
    .S(address[1]),
    .Y(_0325_)
  );
  and_nor21_w1 _0887_ (
    .A(address[0]),
    .B(_0325_),
    .C(address[3]),
    .Y(_0326_)
  );
  and_nor21_w1 _0888_ (
    .A(address[3]),
    .B(\words[15] [15]),
    .C(_0021_),
    .Y(_0046_)
  );
  and_nor22_w1 _0889_ (
    .A(_0320_),
    .B(_0322_),
    .C(_0324_),
    .D(_0326_),
    .Y(_0327_)
  );
  mux2_w1 _0890_ (
    .A(_0318_),
    .B(_0327_),
    .S(address[2]),
    .Y(_0000_[2])
  );
  mux2_w1 _0891_ (
    .A(\words[8] [1]),
    .B(\words[10] [1]),
    .S(address[1]),
    .Y(_0328_)
  );
  nand2_w1 _0892_ (
    .A(_0020_),
    .B(_0328_),
    .Y(_0329_)
  );
  mux2_w1 _0893_ (
    .A(\words[9] [1]),
    .B(\words[11] [1]),
    .S(address[1]),
    .Y(_0330_)
  );
  and_nor21_w1 _0894_ (
    .A(address[0]),
    .B(_0330_),
    .C(_0022_),
    .Y(_0331_)
  );
  mux2_w1 _0895_ (
    .A(\words[0] [1]),
    .B(\words[2] [1]),
    .S(address[1]),
    .Y(_0332_)
  );
  nand2_w1 _0896_ (
    .A(_0020_),
    .B(_0332_),
    .Y(_0333_)
  );
  mux2_w1 _0897_ (
    .A(\words[1] [1]),
    .B(\words[3] [1]),
    .S(address[1]),
    .Y(_0334_)
  );
  and_nor21_w1 _0898_ (
    .A(address[0]),
    .B(_0334_),
    .C(address[3]),
    .Y(_0335_)
  );
  and_nor22_w1 _0899_ (
    .A(_0043_),
    .B(_0044_),
    .C(_0045_),
    .D(_0046_),
    .Y(_0047_)
  );
  and_nor22_w1 _0900_ (
    .A(_0329_),
    .B(_0331_),
    .C(_0333_),
    .D(_0335_),
    .Y(_0336_)
  );
  mux2_w1 _0901_ (
    .A(\words[13] [1]),
    .B(\words[15] [1]),
    .S(address[1]),
    .Y(_0337_)
  );
  nand2_w1 _0902_ (
    .A(address[0]),
    .B(_0337_),
    .Y(_0338_)
  );
  mux2_w1 _0903_ (
    .A(\words[12] [1]),
    .B(\words[14] [1]),
    .S(address[1]),
    .Y(_0339_)
  );
  and_nor21_w1 _0904_ (
    .A(_0020_),
    .B(_0339_),
    .C(_0022_),
    .Y(_0340_)
  );
  mux2_w1 _0905_ (
    .A(\words[4] [1]),
    .B(\words[6] [1]),
    .S(address[1]),
    .Y(_0341_)
  );
  nand2_w1 _0906_ (
    .A(_0020_),
    .B(_0341_),
    .Y(_0342_)
  );
  mux2_w1 _0907_ (
    .A(\words[5] [1]),
    .B(\words[7] [1]),
    .S(address[1]),
    .Y(_0343_)
  );
  and_nor21_w1 _0908_ (
    .A(address[0]),
    .B(_0343_),
    .C(address[3]),
    .Y(_0344_)
  );
  and_nor22_w1 _0909_ (
    .A(_0338_),
    .B(_0340_),
    .C(_0342_),
    .D(_0344_),
    .Y(_0345_)
  );
  nand2_w1 _0910_ (
    .A(\words[4] [15]),
    .B(_0022_),
    .Y(_0048_)
  );
  mux2_w1 _0911_ (
    .A(_0336_),
    .B(_0345_),
    .S(address[2]),
    .Y(_0000_[1])
  );
  and_nor21_w1 _0912_ (
    .A(address[3]),
    .B(\words[12] [15]),
    .C(address[1]),
    .Y(_0049_)
  );
  nand2_w1 _0913_ (
    .A(_0022_),
    .B(\words[6] [15]),
    .Y(_0050_)
  );
  and_nor21_w1 _0914_ (
    .A(address[3]),
    .B(\words[14] [15]),
    .C(_0021_),
    .Y(_0051_)
  );
  inv_w1 _0915_ (
    .A(next[0]),
    .Y(_0024_)
  );
  and_nor22_w1 _0916_ (
    .A(_0048_),
    .B(_0049_),
    .C(_0050_),
    .D(_0051_),
    .Y(_0052_)
  );
  mux2_w1 _0917_ (
    .A(_0047_),
    .B(_0052_),
    .S(_0020_),
    .Y(_0053_)
  );
  mux2_w1 _0918_ (
    .A(_0042_),
    .B(_0053_),
    .S(address[2]),
    .Y(_0000_[15])
  );
  nand3_w1 _0919_ (
    .A(write),
    .B(_0346_[0]),
    .C(_0016_),
    .Y(_0054_)
  );
  nor2_w1 _0920_ (
    .A(_0027_),
    .B(_0054_),
    .Y(_0019_)
  );
  nor2_w1 _0921_ (
    .A(_0021_),
    .B(\words[7] [0]),
    .Y(_0055_)
  );
  mux2_w1 _0922_ (
    .A(\words[4] [0]),
    .B(\words[6] [0]),
    .S(address[1]),
    .Y(_0056_)
  );
  nand2_w1 _0923_ (
    .A(_0021_),
    .B(\words[8] [0]),
    .Y(_0057_)
  );
  and_nor21_w1 _0924_ (
    .A(address[1]),
    .B(\words[10] [0]),
    .C(address[0]),
    .Y(_0058_)
  );
  nand2_w1 _0925_ (
    .A(address[1]),
    .B(\words[11] [0]),
    .Y(_0059_)
  );
  inv_w1 _0926_ (
    .A(next[1]),
    .Y(_0025_)
  );
  and_nor21_w1 _0927_ (
    .A(_0021_),
    .B(\words[9] [0]),
    .C(_0020_),
    .Y(_0060_)
  );
  and_nor22_w1 _0928_ (
    .A(_0057_),
    .B(_0058_),
    .C(_0059_),
    .D(_0060_),
    .Y(_0061_)
  );
  mux2_w1 _0929_ (
    .A(\words[1] [0]),
    .B(\words[3] [0]),
    .S(address[1]),
    .Y(_0062_)
  );
  mux2_w1 _0930_ (
    .A(\words[0] [0]),
    .B(\words[2] [0]),
    .S(address[1]),
    .Y(_0063_)
  );
  mux2_w1 _0931_ (
    .A(_0062_),
    .B(_0063_),
    .S(_0020_),
    .Y(_0064_)
  );
  mux2_w1 _0932_ (
    .A(\words[13] [0]),
    .B(\words[15] [0]),
    .S(address[1]),
    .Y(_0065_)
  );
  nand2_w1 _0933_ (
    .A(address[0]),
    .B(_0065_),
    .Y(_0066_)
  );
  mux2_w1 _0934_ (
    .A(\words[12] [0]),
    .B(\words[14] [0]),
    .S(address[1]),
    .Y(_0067_)
  );
  and_nor21_w1 _0935_ (
    .A(_0020_),
    .B(_0067_),
    .C(_0023_),
    .Y(_0068_)
  );
  and_nor21_w1 _0936_ (
    .A(_0066_),
    .B(_0068_),
    .C(_0022_),
    .Y(_0069_)
  );
  inv_w1 _0937_ (
    .A(next[3]),
    .Y(_0026_)
  );
  or_nand21_w1 _0938_ (
    .A(address[2]),
    .B(_0061_),
    .C(_0069_),
    .Y(_0070_)
  );
  or_nand21_w1 _0939_ (
    .A(address[1]),
    .B(\words[5] [0]),
    .C(address[0]),
    .Y(_0071_)
  );
  and_nor21_w1 _0940_ (
    .A(_0020_),
    .B(_0056_),
    .C(_0023_),
    .Y(_0072_)
  );
  or_nand21_w1 _0941_ (
    .A(_0055_),
    .B(_0071_),
    .C(_0072_),
    .Y(_0073_)
  );
  or_nand21_w1 _0942_ (
    .A(address[2]),
    .B(_0064_),
    .C(_0073_),
    .Y(_0074_)
  );
  or_nand21_w1 _0943_ (
    .A(address[3]),
    .B(_0074_),
    .C(_0070_),
    .Y(_0000_[0])
  );
  nand3_w1 _0944_ (
    .A(next[0]),
    .B(next[1]),
    .C(next[2]),
    .Y(_0075_)
  );
  xor2_w1 _0945_ (
    .A(_0018_),
    .B(_0075_),
    .Y(_0347_[3])
  );
  xor2_w1 _0946_ (
    .A(next[0]),
    .B(next[1]),
    .Y(_0347_[1])
  );
  xor2_w1 _0947_ (
    .A(_0017_),
    .B(_0029_),
    .Y(_0347_[2])
  );
  nand2_w1 _0948_ (
    .A(_0017_),
    .B(_0018_),
    .Y(_0027_)
  );
  nand3_w1 _0949_ (
    .A(write),
    .B(_0024_),
    .C(next[1]),
    .Y(_0076_)
  );
  nor2_w1 _0950_ (
    .A(_0031_),
    .B(_0076_),
    .Y(_0010_)
  );
  nor2_w1 _0951_ (
    .A(_0027_),
    .B(_0076_),
    .Y(_0014_)
  );
  nor2_w1 _0952_ (
    .A(_0031_),
    .B(_0054_),
    .Y(_0012_)
  );
  nor2_w1 _0953_ (
    .A(_0033_),
    .B(_0076_),
    .Y(_0002_)
  );
  nor2_w1 _0954_ (
    .A(_0033_),
    .B(_0054_),
    .Y(_0004_)
  );
  nor2_w1 _0955_ (
    .A(_0032_),
    .B(_0076_),
    .Y(_0006_)
  );
  nor2_w1 _0956_ (
    .A(_0032_),
    .B(_0054_),
    .Y(_0008_)
  );
  nor2_w1 _0957_ (
    .A(_0021_),
    .B(\words[7] [14]),
    .Y(_0077_)
  );
  mux2_w1 _0958_ (
    .A(\words[4] [14]),
    .B(\words[6] [14]),
    .S(address[1]),
    .Y(_0078_)
  );
  nand3_w1 _0959_ (
    .A(write),
    .B(next[0]),
    .C(_0025_),
    .Y(_0028_)
  );
  nand2_w1 _0960_ (
    .A(_0021_),
    .B(\words[8] [14]),
    .Y(_0079_)
  );
  and_nor21_w1 _0961_ (
    .A(address[1]),
    .B(\words[10] [14]),
    .C(address[0]),
    .Y(_0080_)
  );
  nand2_w1 _0962_ (
    .A(address[1]),
    .B(\words[11] [14]),
    .Y(_0081_)
  );
  and_nor21_w1 _0963_ (
    .A(_0021_),
    .B(\words[9] [14]),
    .C(_0020_),
    .Y(_0082_)
  );
  and_nor22_w1 _0964_ (
    .A(_0079_),
    .B(_0080_),
    .C(_0081_),
    .D(_0082_),
    .Y(_0083_)
  );
  mux2_w1 _0965_ (
    .A(\words[1] [14]),
    .B(\words[3] [14]),
    .S(address[1]),
    .Y(_0084_)
  );
  mux2_w1 _0966_ (
    .A(\words[0] [14]),
    .B(\words[2] [14]),
    .S(address[1]),
    .Y(_0085_)
  );
  mux2_w1 _0967_ (
    .A(_0084_),
    .B(_0085_),
    .S(_0020_),
    .Y(_0086_)
  );
  mux2_w1 _0968_ (
    .A(\words[13] [14]),
    .B(\words[15] [14]),
    .S(address[1]),
    .Y(_0087_)
  );
  mux2_w1 _0969_ (
    .A(\words[12] [14]),
    .B(\words[14] [14]),
    .S(address[1]),
    .Y(_0088_)
  );
  nor2_w1 _0970_ (
    .A(_0027_),
    .B(_0028_),
    .Y(_0015_)
  );
  nand2_w1 _0971_ (
    .A(_0020_),
    .B(_0088_),
    .Y(_0089_)
  );
  nand2_w1 _0972_ (
    .A(address[2]),
    .B(_0089_),
    .Y(_0090_)
  );
  and_nor21_w1 _0973_ (
    .A(address[0]),
    .B(_0087_),
    .C(_0090_),
    .Y(_0091_)
  );
  or_nand21_w1 _0974_ (
    .A(address[2]),
    .B(_0083_),
    .C(address[3]),
    .Y(_0092_)
  );
  or_nand21_w1 _0975_ (
    .A(address[1]),
    .B(\words[5] [14]),
    .C(address[0]),
    .Y(_0093_)
  );
  and_nor21_w1 _0976_ (
    .A(_0020_),
    .B(_0078_),
    .C(_0023_),
    .Y(_0094_)
  );
  or_nand21_w1 _0977_ (
    .A(_0077_),
    .B(_0093_),
    .C(_0094_),
    .Y(_0095_)
  );
  or_nand21_w1 _0978_ (
    .A(address[2]),
    .B(_0086_),
    .C(_0095_),
    .Y(_0096_)
  );
  or_nand22_w1 _0979_ (
    .A(_0091_),
    .B(_0092_),
    .C(_0096_),
    .D(address[3]),
    .Y(_0000_[14])
  );
  mux2_w1 _0980_ (
    .A(\words[9] [13]),
    .B(\words[11] [13]),
    .S(address[1]),
    .Y(_0097_)
  );
  flop_e_w1 _0981_ (
    .CK(clk),
    .D(value[0]),
    .E(_0001_),
    .Q(\words[15] [0]),
    .QN(_0602_)
  );
  flop_e_w1 _0982_ (
    .CK(clk),
    .D(value[1]),
    .E(_0001_),
    .Q(\words[15] [1]),
    .QN(_0601_)
  );
  flop_e_w1 _0983_ (
    .CK(clk),
    .D(value[2]),
    .E(_0001_),
    .Q(\words[15] [2]),
    .QN(_0600_)
  );
  flop_e_w1 _0984_ (
    .CK(clk),
    .D(value[3]),
    .E(_0001_),
    .Q(\words[15] [3]),
    .QN(_0599_)
  );
  flop_e_w1 _0985_ (
    .CK(clk),
    .D(value[4]),
    .E(_0001_),
    .Q(\words[15] [4]),
    .QN(_0598_)
  );
  flop_e_w1 _0986_ (
    .CK(clk),
    .D(value[5]),
    .E(_0001_),
    .Q(\words[15] [5]),
    .QN(_0597_)
  );
  flop_e_w1 _0987_ (
    .CK(clk),
    .D(value[6]),
    .E(_0001_),
    .Q(\words[15] [6]),
    .QN(_0596_)
  );
  flop_e_w1 _0988_ (
    .CK(clk),
    .D(value[7]),
    .E(_0001_),
    .Q(\words[15] [7]),
    .QN(_0595_)
  );
  flop_e_w1 _0989_ (
    .CK(clk),
    .D(value[8]),
    .E(_0001_),
    .Q(\words[15] [8]),
    .QN(_0594_)
  );
  flop_e_w1 _0990_ (
    .CK(clk),
    .D(value[9]),
    .E(_0001_),
    .Q(\words[15] [9]),
    .QN(_0593_)
  );
  flop_e_w1 _0991_ (
    .CK(clk),
    .D(value[10]),
    .E(_0001_),
    .Q(\words[15] [10]),
    .QN(_0592_)
  );
  flop_e_w1 _0992_ (
    .CK(clk),
    .D(value[11]),
    .E(_0001_),
    .Q(\words[15] [11]),
    .QN(_0591_)
  );
  flop_e_w1 _0993_ (
    .CK(clk),
    .D(value[12]),
    .E(_0001_),
    .Q(\words[15] [12]),
    .QN(_0590_)
  );
  flop_e_w1 _0994_ (
    .CK(clk),
    .D(value[13]),
    .E(_0001_),
    .Q(\words[15] [13]),
    .QN(_0589_)
  );
  flop_e_w1 _0995_ (
    .CK(clk),
    .D(value[14]),
    .E(_0001_),
    .Q(\words[15] [14]),
    .QN(_0588_)
  );
  flop_e_w1 _0996_ (
    .CK(clk),
    .D(value[15]),
    .E(_0001_),
    .Q(\words[15] [15]),
    .QN(_0604_)
  );
  flop_e_w1 _0997_ (
    .CK(clk),
    .D(value[0]),
    .E(_0002_),
    .Q(\words[14] [0]),
    .QN(_0587_)
  );
  flop_e_w1 _0998_ (
    .CK(clk),
    .D(value[1]),
    .E(_0002_),
    .Q(\words[14] [1]),
    .QN(_0586_)
  );
  flop_e_w1 _0999_ (
    .CK(clk),
    .D(value[2]),
    .E(_0002_),
    .Q(\words[14] [2]),
    .QN(_0585_)
  );
  flop_e_w1 _1000_ (
    .CK(clk),
    .D(value[3]),
    .E(_0002_),
    .Q(\words[14] [3]),
    .QN(_0584_)
  );
  flop_e_w1 _1001_ (
    .CK(clk),
    .D(value[4]),
    .E(_0002_),
    .Q(\words[14] [4]),
    .QN(_0583_)
  );
  flop_e_w1 _1002_ (
    .CK(clk),
    .D(value[5]),
    .E(_0002_),
    .Q(\words[14] [5]),
    .QN(_0582_)
  );
  flop_e_w1 _1003_ (
    .CK(clk),
    .D(value[6]),
    .E(_0002_),
    .Q(\words[14] [6]),
    .QN(_0581_)
  );
  flop_e_w1 _1004_ (
    .CK(clk),
    .D(value[7]),
    .E(_0002_),
    .Q(\words[14] [7]),
    .QN(_0580_)
  );
  flop_e_w1 _1005_ (
    .CK(clk),
    .D(value[8]),
    .E(_0002_),
    .Q(\words[14] [8]),
    .QN(_0579_)
  );
  flop_e_w1 _1006_ (
    .CK(clk),
    .D(value[9]),
    .E(_0002_),
    .Q(\words[14] [9]),
    .QN(_0578_)
  );
  flop_e_w1 _1007_ (
    .CK(clk),
    .D(value[10]),
    .E(_0002_),
    .Q(\words[14] [10]),
    .QN(_0577_)
  );
  flop_e_w1 _1008_ (
    .CK(clk),
    .D(value[11]),
    .E(_0002_),
    .Q(\words[14] [11]),
    .QN(_0576_)
  );
  flop_e_w1 _1009_ (
    .CK(clk),
    .D(value[12]),
    .E(_0002_),
    .Q(\words[14] [12]),
    .QN(_0575_)
  );
  flop_e_w1 _1010_ (
    .CK(clk),
    .D(value[13]),
    .E(_0002_),
    .Q(\words[14] [13]),
    .QN(_0574_)
  );
  flop_e_w1 _1011_ (
    .CK(clk),
    .D(value[14]),
    .E(_0002_),
    .Q(\words[14] [14]),
    .QN(_0573_)
  );
  flop_e_w1 _1012_ (
    .CK(clk),
    .D(value[15]),
    .E(_0002_),
    .Q(\words[14] [15]),
    .QN(_0605_)
  );
  flop_e_w1 _1013_ (
    .CK(clk),
    .D(value[0]),
    .E(_0003_),
    .Q(\words[13] [0]),
    .QN(_0572_)
  );
  flop_e_w1 _1014_ (
    .CK(clk),
    .D(value[1]),
    .E(_0003_),
    .Q(\words[13] [1]),
    .QN(_0571_)
  );
  flop_e_w1 _1015_ (
    .CK(clk),
    .D(value[2]),
    .E(_0003_),
    .Q(\words[13] [2]),
    .QN(_0570_)
  );
  flop_e_w1 _1016_ (
    .CK(clk),
    .D(value[3]),
    .E(_0003_),
    .Q(\words[13] [3]),
    .QN(_0569_)
  );
  flop_e_w1 _1017_ (
    .CK(clk),
    .D(value[4]),
    .E(_0003_),
    .Q(\words[13] [4]),
    .QN(_0568_)
  );
  flop_e_w1 _1018_ (
    .CK(clk),
    .D(value[5]),
    .E(_0003_),
    .Q(\words[13] [5]),
    .QN(_0567_)
  );
  flop_e_w1 _1019_ (
    .CK(clk),
    .D(value[6]),
    .E(_0003_),
    .Q(\words[13] [6]),
    .QN(_0566_)
  );
  flop_e_w1 _1020_ (
    .CK(clk),
    .D(value[7]),
    .E(_0003_),
    .Q(\words[13] [7]),
    .QN(_0565_)
  );
  flop_e_w1 _1021_ (
    .CK(clk),
    .D(value[8]),
    .E(_0003_),
    .Q(\words[13] [8]),
    .QN(_0564_)
  );
  flop_e_w1 _1022_ (
    .CK(clk),
    .D(value[9]),
    .E(_0003_),
    .Q(\words[13] [9]),
    .QN(_0563_)
  );
  flop_e_w1 _1023_ (
    .CK(clk),
    .D(value[10]),
    .E(_0003_),
    .Q(\words[13] [10]),
    .QN(_0562_)
  );
  flop_e_w1 _1024_ (
    .CK(clk),
    .D(value[11]),
    .E(_0003_),
    .Q(\words[13] [11]),
    .QN(_0561_)
  );
  flop_e_w1 _1025_ (
    .CK(clk),
    .D(value[12]),
    .E(_0003_),
    .Q(\words[13] [12]),
    .QN(_0560_)
  );
  flop_e_w1 _1026_ (
    .CK(clk),
    .D(value[13]),
    .E(_0003_),
    .Q(\words[13] [13]),
    .QN(_0559_)
  );
  flop_e_w1 _1027_ (
    .CK(clk),
    .D(value[14]),
    .E(_0003_),
    .Q(\words[13] [14]),
    .QN(_0558_)
  );
  flop_e_w1 _1028_ (
    .CK(clk),
    .D(value[15]),
    .E(_0003_),
    .Q(\words[13] [15]),
    .QN(_0606_)
  );
  flop_e_w1 _1029_ (
    .CK(clk),
    .D(value[0]),
    .E(_0004_),
    .Q(\words[12] [0]),
    .QN(_0557_)
  );
  flop_e_w1 _1030_ (
    .CK(clk),
    .D(value[1]),
    .E(_0004_),
    .Q(\words[12] [1]),
    .QN(_0556_)
  );
  flop_e_w1 _1031_ (
    .CK(clk),
    .D(value[2]),
    .E(_0004_),
    .Q(\words[12] [2]),
    .QN(_0555_)
  );
  flop_e_w1 _1032_ (
    .CK(clk),
    .D(value[3]),
    .E(_0004_),
    .Q(\words[12] [3]),
    .QN(_0554_)
  );
  flop_e_w1 _1033_ (
    .CK(clk),
    .D(value[4]),
    .E(_0004_),
    .Q(\words[12] [4]),
    .QN(_0553_)
  );
  flop_e_w1 _1034_ (
    .CK(clk),
    .D(value[5]),
    .E(_0004_),
    .Q(\words[12] [5]),
    .QN(_0552_)
  );
  flop_e_w1 _1035_ (
    .CK(clk),
    .D(value[6]),
    .E(_0004_),
    .Q(\words[12] [6]),
    .QN(_0551_)
  );
  flop_e_w1 _1036_ (
    .CK(clk),
    .D(value[7]),
    .E(_0004_),
    .Q(\words[12] [7]),
    .QN(_0550_)
  );
  flop_e_w1 _1037_ (
    .CK(clk),
    .D(value[8]),
    .E(_0004_),
    .Q(\words[12] [8]),
    .QN(_0549_)
  );
  flop_e_w1 _1038_ (
    .CK(clk),
    .D(value[9]),
    .E(_0004_),
    .Q(\words[12] [9]),
    .QN(_0548_)
  );
  flop_e_w1 _1039_ (
    .CK(clk),
    .D(value[10]),
    .E(_0004_),
    .Q(\words[12] [10]),
    .QN(_0547_)
  );
  flop_e_w1 _1040_ (
    .CK(clk),
    .D(value[11]),
    .E(_0004_),
    .Q(\words[12] [11]),
    .QN(_0546_)
  );
  flop_e_w1 _1041_ (
    .CK(clk),
    .D(value[12]),
    .E(_0004_),
    .Q(\words[12] [12]),
    .QN(_0545_)
  );
  flop_e_w1 _1042_ (
    .CK(clk),
    .D(value[13]),
    .E(_0004_),
    .Q(\words[12] [13]),
    .QN(_0544_)
  );
  flop_e_w1 _1043_ (
    .CK(clk),
    .D(value[14]),
    .E(_0004_),
    .Q(\words[12] [14]),
    .QN(_0543_)
  );
  flop_e_w1 _1044_ (
    .CK(clk),
    .D(value[15]),
    .E(_0004_),
    .Q(\words[12] [15]),
    .QN(_0607_)
  );
  flop_e_w1 _1045_ (
    .CK(clk),
    .D(value[0]),
    .E(_0005_),
    .Q(\words[11] [0]),
    .QN(_0542_)
  );
  flop_e_w1 _1046_ (
    .CK(clk),
    .D(value[1]),
    .E(_0005_),
    .Q(\words[11] [1]),
    .QN(_0541_)
  );
  flop_e_w1 _1047_ (
    .CK(clk),
    .D(value[2]),
    .E(_0005_),
    .Q(\words[11] [2]),
    .QN(_0540_)
  );
  flop_e_w1 _1048_ (
    .CK(clk),
    .D(value[3]),
    .E(_0005_),
    .Q(\words[11] [3]),
    .QN(_0539_)
  );
  flop_e_w1 _1049_ (
    .CK(clk),
    .D(value[4]),
    .E(_0005_),
    .Q(\words[11] [4]),
    .QN(_0538_)
  );
  flop_e_w1 _1050_ (
    .CK(clk),
    .D(value[5]),
    .E(_0005_),
    .Q(\words[11] [5]),
    .QN(_0537_)
  );
  flop_e_w1 _1051_ (
    .CK(clk),
    .D(value[6]),
    .E(_0005_),
    .Q(\words[11] [6]),
    .QN(_0536_)
  );
  flop_e_w1 _1052_ (
    .CK(clk),
    .D(value[7]),
    .E(_0005_),
    .Q(\words[11] [7]),
    .QN(_0535_)
  );
  flop_e_w1 _1053_ (
    .CK(clk),
    .D(value[8]),
    .E(_0005_),
    .Q(\words[11] [8]),
    .QN(_0534_)
  );
  flop_e_w1 _1054_ (
    .CK(clk),
    .D(value[9]),
    .E(_0005_),
    .Q(\words[11] [9]),
    .QN(_0533_)
  );
  flop_e_w1 _1055_ (
    .CK(clk),
    .D(value[10]),
    .E(_0005_),
    .Q(\words[11] [10]),
    .QN(_0532_)
  );
  flop_e_w1 _1056_ (
    .CK(clk),
    .D(value[11]),
    .E(_0005_),
    .Q(\words[11] [11]),
    .QN(_0531_)
  );
  flop_e_w1 _1057_ (
    .CK(clk),
    .D(value[12]),
    .E(_0005_),
    .Q(\words[11] [12]),
    .QN(_0530_)
  );
  flop_e_w1 _1058_ (
    .CK(clk),
    .D(value[13]),
    .E(_0005_),
    .Q(\words[11] [13]),
    .QN(_0529_)
  );
  flop_e_w1 _1059_ (
    .CK(clk),
    .D(value[14]),
    .E(_0005_),
    .Q(\words[11] [14]),
    .QN(_0528_)
  );
  flop_e_w1 _1060_ (
    .CK(clk),
    .D(value[15]),
    .E(_0005_),
    .Q(\words[11] [15]),
    .QN(_0608_)
  );
  flop_e_w1 _1061_ (
    .CK(clk),
    .D(value[0]),
    .E(_0006_),
    .Q(\words[10] [0]),
    .QN(_0527_)
  );
  flop_e_w1 _1062_ (
    .CK(clk),
    .D(value[1]),
    .E(_0006_),
    .Q(\words[10] [1]),
    .QN(_0526_)
  );
  flop_e_w1 _1063_ (
    .CK(clk),
    .D(value[2]),
    .E(_0006_),
    .Q(\words[10] [2]),
    .QN(_0525_)
  );
  flop_e_w1 _1064_ (
    .CK(clk),
    .D(value[3]),
    .E(_0006_),
    .Q(\words[10] [3]),
    .QN(_0524_)
  );
  flop_e_w1 _1065_ (
    .CK(clk),
    .D(value[4]),
    .E(_0006_),
    .Q(\words[10] [4]),
    .QN(_0523_)
  );
  flop_e_w1 _1066_ (
    .CK(clk),
    .D(value[5]),
    .E(_0006_),
    .Q(\words[10] [5]),
    .QN(_0522_)
  );
  flop_e_w1 _1067_ (
    .CK(clk),
    .D(value[6]),
    .E(_0006_),
    .Q(\words[10] [6]),
    .QN(_0521_)
  );
  flop_e_w1 _1068_ (
    .CK(clk),
    .D(value[7]),
    .E(_0006_),
    .Q(\words[10] [7]),
    .QN(_0520_)
  );
  flop_e_w1 _1069_ (
    .CK(clk),
    .D(value[8]),
    .E(_0006_),
    .Q(\words[10] [8]),
    .QN(_0519_)
  );
  flop_e_w1 _1070_ (
    .CK(clk),
    .D(value[9]),
    .E(_0006_),
    .Q(\words[10] [9]),
    .QN(_0518_)
  );
  flop_e_w1 _1071_ (
    .CK(clk),
    .D(value[10]),
    .E(_0006_),
    .Q(\words[10] [10]),
    .QN(_0517_)
  );
  flop_e_w1 _1072_ (
    .CK(clk),
    .D(value[11]),
    .E(_0006_),
    .Q(\words[10] [11]),
    .QN(_0516_)
  );
  flop_e_w1 _1073_ (
    .CK(clk),
    .D(value[12]),
    .E(_0006_),
    .Q(\words[10] [12]),
    .QN(_0515_)
  );
  flop_e_w1 _1074_ (
    .CK(clk),
    .D(value[13]),
    .E(_0006_),
    .Q(\words[10] [13]),
    .QN(_0514_)
  );
  flop_e_w1 _1075_ (
    .CK(clk),
    .D(value[14]),
    .E(_0006_),
    .Q(\words[10] [14]),
    .QN(_0513_)
  );
  flop_e_w1 _1076_ (
    .CK(clk),
    .D(value[15]),
    .E(_0006_),
    .Q(\words[10] [15]),
    .QN(_0609_)
  );
  flop_e_w1 _1077_ (
    .CK(clk),
    .D(value[0]),
    .E(_0007_),
    .Q(\words[9] [0]),
    .QN(_0512_)
  );
  flop_e_w1 _1078_ (
    .CK(clk),
    .D(value[1]),
    .E(_0007_),
    .Q(\words[9] [1]),
    .QN(_0511_)
  );
  flop_e_w1 _1079_ (
    .CK(clk),
    .D(value[2]),
    .E(_0007_),
    .Q(\words[9] [2]),
    .QN(_0510_)
  );
  flop_e_w1 _1080_ (
    .CK(clk),
    .D(value[3]),
    .E(_0007_),
    .Q(\words[9] [3]),
    .QN(_0509_)
  );
  flop_e_w1 _1081_ (
    .CK(clk),
    .D(value[4]),
    .E(_0007_),
    .Q(\words[9] [4]),
    .QN(_0508_)
  );
  flop_e_w1 _1082_ (
    .CK(clk),
    .D(value[5]),
    .E(_0007_),
    .Q(\words[9] [5]),
    .QN(_0507_)
  );
  flop_e_w1 _1083_ (
    .CK(clk),
    .D(value[6]),
    .E(_0007_),
    .Q(\words[9] [6]),
    .QN(_0506_)
  );
  flop_e_w1 _1084_ (
    .CK(clk),
    .D(value[7]),
    .E(_0007_),
    .Q(\words[9] [7]),
    .QN(_0505_)
  );
  flop_e_w1 _1085_ (
    .CK(clk),
    .D(value[8]),
    .E(_0007_),
    .Q(\words[9] [8]),
    .QN(_0504_)
  );
  flop_e_w1 _1086_ (
    .CK(clk),
    .D(value[9]),
    .E(_0007_),
    .Q(\words[9] [9]),
    .QN(_0503_)
  );
  flop_e_w1 _1087_ (
    .CK(clk),
    .D(value[10]),
    .E(_0007_),
    .Q(\words[9] [10]),
    .QN(_0502_)
  );
  flop_e_w1 _1088_ (
    .CK(clk),
    .D(value[11]),
    .E(_0007_),
    .Q(\words[9] [11]),
    .QN(_0501_)
  );
  flop_e_w1 _1089_ (
    .CK(clk),
    .D(value[12]),
    .E(_0007_),
    .Q(\words[9] [12]),
    .QN(_0500_)
  );
  flop_e_w1 _1090_ (
    .CK(clk),
    .D(value[13]),
    .E(_0007_),
    .Q(\words[9] [13]),
    .QN(_0499_)
  );
  flop_e_w1 _1091_ (
    .CK(clk),
    .D(value[14]),
    .E(_0007_),
    .Q(\words[9] [14]),
    .QN(_0498_)
  );
  flop_e_w1 _1092_ (
    .CK(clk),
    .D(value[15]),
    .E(_0007_),
    .Q(\words[9] [15]),
    .QN(_0610_)
  );
  flop_e_w1 _1093_ (
    .CK(clk),
    .D(value[0]),
    .E(_0008_),
    .Q(\words[8] [0]),
    .QN(_0497_)
  );
  flop_e_w1 _1094_ (
    .CK(clk),
    .D(value[1]),
    .E(_0008_),
    .Q(\words[8] [1]),
    .QN(_0496_)
  );
  flop_e_w1 _1095_ (
    .CK(clk),
    .D(value[2]),
    .E(_0008_),
    .Q(\words[8] [2]),
    .QN(_0495_)
  );
  flop_e_w1 _1096_ (
    .CK(clk),
    .D(value[3]),
    .E(_0008_),
    .Q(\words[8] [3]),
    .QN(_0494_)
  );
  flop_e_w1 _1097_ (
    .CK(clk),
    .D(value[4]),
    .E(_0008_),
    .Q(\words[8] [4]),
    .QN(_0493_)
  );
  flop_e_w1 _1098_ (
    .CK(clk),
    .D(value[5]),
    .E(_0008_),
    .Q(\words[8] [5]),
    .QN(_0492_)
  );
  flop_e_w1 _1099_ (
    .CK(clk),
    .D(value[6]),
    .E(_0008_),
    .Q(\words[8] [6]),
    .QN(_0491_)
  );
  flop_e_w1 _1100_ (
    .CK(clk),
    .D(value[7]),
    .E(_0008_),
    .Q(\words[8] [7]),
    .QN(_0490_)
  );
  flop_e_w1 _1101_ (
    .CK(clk),
    .D(value[8]),
    .E(_0008_),
    .Q(\words[8] [8]),
    .QN(_0489_)
  );
  flop_e_w1 _1102_ (
    .CK(clk),
    .D(value[9]),
    .E(_0008_),
    .Q(\words[8] [9]),
    .QN(_0488_)
  );
  flop_e_w1 _1103_ (
    .CK(clk),
    .D(value[10]),
    .E(_0008_),
    .Q(\words[8] [10]),
    .QN(_0487_)
  );
  flop_e_w1 _1104_ (
    .CK(clk),
    .D(value[11]),
    .E(_0008_),
    .Q(\words[8] [11]),
    .QN(_0486_)
  );
  flop_e_w1 _1105_ (
    .CK(clk),
    .D(value[12]),
    .E(_0008_),
    .Q(\words[8] [12]),
    .QN(_0485_)
  );
  flop_e_w1 _1106_ (
    .CK(clk),
    .D(value[13]),
    .E(_0008_),
    .Q(\words[8] [13]),
    .QN(_0484_)
  );
  flop_e_w1 _1107_ (
    .CK(clk),
    .D(value[14]),
    .E(_0008_),
    .Q(\words[8] [14]),
    .QN(_0483_)
  );
  flop_e_w1 _1108_ (
    .CK(clk),
    .D(value[15]),
    .E(_0008_),
    .Q(\words[8] [15]),
    .QN(_0611_)
  );
  flop_e_w1 _1109_ (
    .CK(clk),
    .D(value[0]),
    .E(_0009_),
    .Q(\words[7] [0]),
    .QN(_0482_)
  );
  flop_e_w1 _1110_ (
    .CK(clk),
    .D(value[1]),
    .E(_0009_),
    .Q(\words[7] [1]),
    .QN(_0481_)
  );
  flop_e_w1 _1111_ (
    .CK(clk),
    .D(value[2]),
    .E(_0009_),
    .Q(\words[7] [2]),
    .QN(_0480_)
  );
  flop_e_w1 _1112_ (
    .CK(clk),
    .D(value[3]),
    .E(_0009_),
    .Q(\words[7] [3]),
    .QN(_0479_)
  );
  flop_e_w1 _1113_ (
    .CK(clk),
    .D(value[4]),
    .E(_0009_),
    .Q(\words[7] [4]),
    .QN(_0478_)
  );
  flop_e_w1 _1114_ (
    .CK(clk),
    .D(value[5]),
    .E(_0009_),
    .Q(\words[7] [5]),
    .QN(_0477_)
  );
  flop_e_w1 _1115_ (
    .CK(clk),
    .D(value[6]),
    .E(_0009_),
    .Q(\words[7] [6]),
    .QN(_0476_)
  );
  flop_e_w1 _1116_ (
    .CK(clk),
    .D(value[7]),
    .E(_0009_),
    .Q(\words[7] [7]),
    .QN(_0475_)
  );
  flop_e_w1 _1117_ (
    .CK(clk),
    .D(value[8]),
    .E(_0009_),
    .Q(\words[7] [8]),
    .QN(_0474_)
  );
  flop_e_w1 _1118_ (
    .CK(clk),
    .D(value[9]),
    .E(_0009_),
    .Q(\words[7] [9]),
    .QN(_0473_)
  );
  flop_e_w1 _1119_ (
    .CK(clk),
    .D(value[10]),
    .E(_0009_),
    .Q(\words[7] [10]),
    .QN(_0472_)
  );
  flop_e_w1 _1120_ (
    .CK(clk),
    .D(value[11]),
    .E(_0009_),
    .Q(\words[7] [11]),
    .QN(_0471_)
  );
  flop_e_w1 _1121_ (
    .CK(clk),
    .D(value[12]),
    .E(_0009_),
    .Q(\words[7] [12]),
    .QN(_0470_)
  );
  flop_e_w1 _1122_ (
    .CK(clk),
    .D(value[13]),
    .E(_0009_),
    .Q(\words[7] [13]),
    .QN(_0469_)
  );
  flop_e_w1 _1123_ (
    .CK(clk),
    .D(value[14]),
    .E(_0009_),
    .Q(\words[7] [14]),
    .QN(_0468_)
  );
  flop_e_w1 _1124_ (
    .CK(clk),
    .D(value[15]),
    .E(_0009_),
    .Q(\words[7] [15]),
    .QN(_0612_)
  );
  flop_e_w1 _1125_ (
    .CK(clk),
    .D(value[0]),
    .E(_0010_),
    .Q(\words[6] [0]),
    .QN(_0467_)
  );
  flop_e_w1 _1126_ (
    .CK(clk),
    .D(value[1]),
    .E(_0010_),
    .Q(\words[6] [1]),
    .QN(_0466_)
  );
  flop_e_w1 _1127_ (
    .CK(clk),
    .D(value[2]),
    .E(_0010_),
    .Q(\words[6] [2]),
    .QN(_0465_)
  );
  flop_e_w1 _1128_ (
    .CK(clk),
    .D(value[3]),
    .E(_0010_),
    .Q(\words[6] [3]),
    .QN(_0464_)
  );
  flop_e_w1 _1129_ (
    .CK(clk),
    .D(value[4]),
    .E(_0010_),
    .Q(\words[6] [4]),
    .QN(_0463_)
  );
  flop_e_w1 _1130_ (
    .CK(clk),
    .D(value[5]),
    .E(_0010_),
    .Q(\words[6] [5]),
    .QN(_0462_)
  );
  flop_e_w1 _1131_ (
    .CK(clk),
    .D(value[6]),
    .E(_0010_),
    .Q(\words[6] [6]),
    .QN(_0461_)
  );
  flop_e_w1 _1132_ (
    .CK(clk),
    .D(value[7]),
    .E(_0010_),
    .Q(\words[6] [7]),
    .QN(_0460_)
  );
  flop_e_w1 _1133_ (
    .CK(clk),
    .D(value[8]),
    .E(_0010_),
    .Q(\words[6] [8]),
    .QN(_0459_)
  );
  flop_e_w1 _1134_ (
    .CK(clk),
    .D(value[9]),
    .E(_0010_),
    .Q(\words[6] [9]),
    .QN(_0458_)
  );
  flop_e_w1 _1135_ (
    .CK(clk),
    .D(value[10]),
    .E(_0010_),
    .Q(\words[6] [10]),
    .QN(_0457_)
  );
  flop_e_w1 _1136_ (
    .CK(clk),
    .D(value[11]),
    .E(_0010_),
    .Q(\words[6] [11]),
    .QN(_0456_)
  );
  flop_e_w1 _1137_ (
    .CK(clk),
    .D(value[12]),
    .E(_0010_),
    .Q(\words[6] [12]),
    .QN(_0455_)
  );
  flop_e_w1 _1138_ (
    .CK(clk),
    .D(value[13]),
    .E(_0010_),
    .Q(\words[6] [13]),
    .QN(_0454_)
  );
  flop_e_w1 _1139_ (
    .CK(clk),
    .D(value[14]),
    .E(_0010_),
    .Q(\words[6] [14]),
    .QN(_0453_)
  );
  flop_e_w1 _1140_ (
    .CK(clk),
    .D(value[15]),
    .E(_0010_),
    .Q(\words[6] [15]),
    .QN(_0613_)
  );
  flop_e_w1 _1141_ (
    .CK(clk),
    .D(value[0]),
    .E(_0011_),
    .Q(\words[5] [0]),
    .QN(_0452_)
  );
  flop_e_w1 _1142_ (
    .CK(clk),
    .D(value[1]),
    .E(_0011_),
    .Q(\words[5] [1]),
    .QN(_0451_)
  );
  flop_e_w1 _1143_ (
    .CK(clk),
    .D(value[2]),
    .E(_0011_),
    .Q(\words[5] [2]),
    .QN(_0450_)
  );
  flop_e_w1 _1144_ (
    .CK(clk),
    .D(value[3]),
    .E(_0011_),
    .Q(\words[5] [3]),
    .QN(_0449_)
  );
  flop_e_w1 _1145_ (
    .CK(clk),
    .D(value[4]),
    .E(_0011_),
    .Q(\words[5] [4]),
    .QN(_0448_)
  );
  flop_e_w1 _1146_ (
    .CK(clk),
    .D(value[5]),
    .E(_0011_),
    .Q(\words[5] [5]),
    .QN(_0447_)
  );
  flop_e_w1 _1147_ (
    .CK(clk),
    .D(value[6]),
    .E(_0011_),
    .Q(\words[5] [6]),
    .QN(_0446_)
  );
  flop_e_w1 _1148_ (
    .CK(clk),
    .D(value[7]),
    .E(_0011_),
    .Q(\words[5] [7]),
    .QN(_0445_)
  );
  flop_e_w1 _1149_ (
    .CK(clk),
    .D(value[8]),
    .E(_0011_),
    .Q(\words[5] [8]),
    .QN(_0444_)
  );
  flop_e_w1 _1150_ (
    .CK(clk),
    .D(value[9]),
    .E(_0011_),
    .Q(\words[5] [9]),
    .QN(_0443_)
  );
  flop_e_w1 _1151_ (
    .CK(clk),
    .D(value[10]),
    .E(_0011_),
    .Q(\words[5] [10]),
    .QN(_0442_)
  );
  flop_e_w1 _1152_ (
    .CK(clk),
    .D(value[11]),
    .E(_0011_),
    .Q(\words[5] [11]),
    .QN(_0441_)
  );
  flop_e_w1 _1153_ (
    .CK(clk),
    .D(value[12]),
    .E(_0011_),
    .Q(\words[5] [12]),
    .QN(_0440_)
  );
  flop_e_w1 _1154_ (
    .CK(clk),
    .D(value[13]),
    .E(_0011_),
    .Q(\words[5] [13]),
    .QN(_0439_)
  );
  flop_e_w1 _1155_ (
    .CK(clk),
    .D(value[14]),
    .E(_0011_),
    .Q(\words[5] [14]),
    .QN(_0438_)
  );
  flop_e_w1 _1156_ (
    .CK(clk),
    .D(value[15]),
    .E(_0011_),
    .Q(\words[5] [15]),
    .QN(_0614_)
  );
  flop_e_w1 _1157_ (
    .CK(clk),
    .D(value[0]),
    .E(_0012_),
    .Q(\words[4] [0]),
    .QN(_0437_)
  );
  flop_e_w1 _1158_ (
    .CK(clk),
    .D(value[1]),
    .E(_0012_),
    .Q(\words[4] [1]),
    .QN(_0436_)
  );
  flop_e_w1 _1159_ (
    .CK(clk),
    .D(value[2]),
    .E(_0012_),
    .Q(\words[4] [2]),
    .QN(_0435_)
  );
  flop_e_w1 _1160_ (
    .CK(clk),
    .D(value[3]),
    .E(_0012_),
    .Q(\words[4] [3]),
    .QN(_0434_)
  );
  flop_e_w1 _1161_ (
    .CK(clk),
    .D(value[4]),
    .E(_0012_),
    .Q(\words[4] [4]),
    .QN(_0433_)
  );
  flop_e_w1 _1162_ (
    .CK(clk),
    .D(value[5]),
    .E(_0012_),
    .Q(\words[4] [5]),
    .QN(_0432_)
  );
  flop_e_w1 _1163_ (
    .CK(clk),
    .D(value[6]),
    .E(_0012_),
    .Q(\words[4] [6]),
    .QN(_0431_)
  );
  flop_e_w1 _1164_ (
    .CK(clk),
    .D(value[7]),
    .E(_0012_),
    .Q(\words[4] [7]),
    .QN(_0430_)
  );
  flop_e_w1 _1165_ (
    .CK(clk),
    .D(value[8]),
    .E(_0012_),
    .Q(\words[4] [8]),
    .QN(_0429_)
  );
  flop_e_w1 _1166_ (
    .CK(clk),
    .D(value[9]),
    .E(_0012_),
    .Q(\words[4] [9]),
    .QN(_0428_)
  );
  flop_e_w1 _1167_ (
    .CK(clk),
    .D(value[10]),
    .E(_0012_),
    .Q(\words[4] [10]),
    .QN(_0427_)
  );
  flop_e_w1 _1168_ (
    .CK(clk),
    .D(value[11]),
    .E(_0012_),
    .Q(\words[4] [11]),
    .QN(_0426_)
  );
  flop_e_w1 _1169_ (
    .CK(clk),
    .D(value[12]),
    .E(_0012_),
    .Q(\words[4] [12]),
    .QN(_0425_)
  );
  flop_e_w1 _1170_ (
    .CK(clk),
    .D(value[13]),
    .E(_0012_),
    .Q(\words[4] [13]),
    .QN(_0424_)
  );
  flop_e_w1 _1171_ (
    .CK(clk),
    .D(value[14]),
    .E(_0012_),
    .Q(\words[4] [14]),
    .QN(_0423_)
  );
  flop_e_w1 _1172_ (
    .CK(clk),
    .D(value[15]),
    .E(_0012_),
    .Q(\words[4] [15]),
    .QN(_0615_)
  );
  flop_e_w1 _1173_ (
    .CK(clk),
    .D(value[0]),
    .E(_0013_),
    .Q(\words[3] [0]),
    .QN(_0422_)
  );
  flop_e_w1 _1174_ (
    .CK(clk),
    .D(value[1]),
    .E(_0013_),
    .Q(\words[3] [1]),
    .QN(_0421_)
  );
  flop_e_w1 _1175_ (
    .CK(clk),
    .D(value[2]),
    .E(_0013_),
    .Q(\words[3] [2]),
    .QN(_0420_)
  );
  flop_e_w1 _1176_ (
    .CK(clk),
    .D(value[3]),
    .E(_0013_),
    .Q(\words[3] [3]),
    .QN(_0419_)
  );
  flop_e_w1 _1177_ (
    .CK(clk),
    .D(value[4]),
    .E(_0013_),
    .Q(\words[3] [4]),
    .QN(_0418_)
  );
  flop_e_w1 _1178_ (
    .CK(clk),
    .D(value[5]),
    .E(_0013_),
    .Q(\words[3] [5]),
    .QN(_0417_)
  );
  flop_e_w1 _1179_ (
    .CK(clk),
    .D(value[6]),
    .E(_0013_),
    .Q(\words[3] [6]),
    .QN(_0416_)
  );
  flop_e_w1 _1180_ (
    .CK(clk),
    .D(value[7]),
    .E(_0013_),
    .Q(\words[3] [7]),
    .QN(_0415_)
  );
  flop_e_w1 _1181_ (
    .CK(clk),
    .D(value[8]),
    .E(_0013_),
    .Q(\words[3] [8]),
    .QN(_0414_)
  );
  flop_e_w1 _1182_ (
    .CK(clk),
    .D(value[9]),
    .E(_0013_),
    .Q(\words[3] [9]),
    .QN(_0413_)
  );
  flop_e_w1 _1183_ (
    .CK(clk),
    .D(value[10]),
    .E(_0013_),
    .Q(\words[3] [10]),
    .QN(_0412_)
  );
  flop_e_w1 _1184_ (
    .CK(clk),
    .D(value[11]),
    .E(_0013_),
    .Q(\words[3] [11]),
    .QN(_0411_)
  );
  flop_e_w1 _1185_ (
    .CK(clk),
    .D(value[12]),
    .E(_0013_),
    .Q(\words[3] [12]),
    .QN(_0410_)
  );
  flop_e_w1 _1186_ (
    .CK(clk),
    .D(value[13]),
    .E(_0013_),
    .Q(\words[3] [13]),
    .QN(_0409_)
  );
  flop_e_w1 _1187_ (
    .CK(clk),
    .D(value[14]),
    .E(_0013_),
    .Q(\words[3] [14]),
    .QN(_0408_)
  );
  flop_e_w1 _1188_ (
    .CK(clk),
    .D(value[15]),
    .E(_0013_),
    .Q(\words[3] [15]),
    .QN(_0616_)
  );
  flop_e_w1 _1189_ (
    .CK(clk),
    .D(value[0]),
    .E(_0014_),
    .Q(\words[2] [0]),
    .QN(_0407_)
  );
  flop_e_w1 _1190_ (
    .CK(clk),
    .D(value[1]),
    .E(_0014_),
    .Q(\words[2] [1]),
    .QN(_0406_)
  );
  flop_e_w1 _1191_ (
    .CK(clk),
    .D(value[2]),
    .E(_0014_),
    .Q(\words[2] [2]),
    .QN(_0405_)
  );
  flop_e_w1 _1192_ (
    .CK(clk),
    .D(value[3]),
    .E(_0014_),
    .Q(\words[2] [3]),
    .QN(_0404_)
  );
  flop_e_w1 _1193_ (
    .CK(clk),
    .D(value[4]),
    .E(_0014_),
    .Q(\words[2] [4]),
    .QN(_0403_)
  );
  flop_e_w1 _1194_ (
    .CK(clk),
    .D(value[5]),
    .E(_0014_),
    .Q(\words[2] [5]),
    .QN(_0402_)
  );
  flop_e_w1 _1195_ (
    .CK(clk),
    .D(value[6]),
    .E(_0014_),
    .Q(\words[2] [6]),
    .QN(_0401_)
  );
  flop_e_w1 _1196_ (
    .CK(clk),
    .D(value[7]),
    .E(_0014_),
    .Q(\words[2] [7]),
    .QN(_0400_)
  );
  flop_e_w1 _1197_ (
    .CK(clk),
    .D(value[8]),
    .E(_0014_),
    .Q(\words[2] [8]),
    .QN(_0399_)
  );
  flop_e_w1 _1198_ (
    .CK(clk),
    .D(value[9]),
    .E(_0014_),
    .Q(\words[2] [9]),
    .QN(_0398_)
  );
  flop_e_w1 _1199_ (
    .CK(clk),
    .D(value[10]),
    .E(_0014_),
    .Q(\words[2] [10]),
    .QN(_0397_)
  );
  flop_e_w1 _1200_ (
    .CK(clk),
    .D(value[11]),
    .E(_0014_),
    .Q(\words[2] [11]),
    .QN(_0396_)
  );
  flop_e_w1 _1201_ (
    .CK(clk),
    .D(value[12]),
    .E(_0014_),
    .Q(\words[2] [12]),
    .QN(_0395_)
  );
  flop_e_w1 _1202_ (
    .CK(clk),
    .D(value[13]),
    .E(_0014_),
    .Q(\words[2] [13]),
    .QN(_0394_)
  );
  flop_e_w1 _1203_ (
    .CK(clk),
    .D(value[14]),
    .E(_0014_),
    .Q(\words[2] [14]),
    .QN(_0393_)
  );
  flop_e_w1 _1204_ (
    .CK(clk),
    .D(value[15]),
    .E(_0014_),
    .Q(\words[2] [15]),
    .QN(_0617_)
  );
  flop_e_w1 _1205_ (
    .CK(clk),
    .D(value[0]),
    .E(_0015_),
    .Q(\words[1] [0]),
    .QN(_0392_)
  );
  flop_e_w1 _1206_ (
    .CK(clk),
    .D(value[1]),
    .E(_0015_),
    .Q(\words[1] [1]),
    .QN(_0391_)
  );
  flop_e_w1 _1207_ (
    .CK(clk),
    .D(value[2]),
    .E(_0015_),
    .Q(\words[1] [2]),
    .QN(_0390_)
  );
  flop_e_w1 _1208_ (
    .CK(clk),
    .D(value[3]),
    .E(_0015_),
    .Q(\words[1] [3]),
    .QN(_0389_)
  );
  flop_e_w1 _1209_ (
    .CK(clk),
    .D(value[4]),
    .E(_0015_),
    .Q(\words[1] [4]),
    .QN(_0388_)
  );
  flop_e_w1 _1210_ (
    .CK(clk),
    .D(value[5]),
    .E(_0015_),
    .Q(\words[1] [5]),
    .QN(_0387_)
  );
  flop_e_w1 _1211_ (
    .CK(clk),
    .D(value[6]),
    .E(_0015_),
    .Q(\words[1] [6]),
    .QN(_0386_)
  );
  flop_e_w1 _1212_ (
    .CK(clk),
    .D(value[7]),
    .E(_0015_),
    .Q(\words[1] [7]),
    .QN(_0385_)
  );
  flop_e_w1 _1213_ (
    .CK(clk),
    .D(value[8]),
    .E(_0015_),
    .Q(\words[1] [8]),
    .QN(_0384_)
  );
  flop_e_w1 _1214_ (
    .CK(clk),
    .D(value[9]),
    .E(_0015_),
    .Q(\words[1] [9]),
    .QN(_0383_)
  );
  flop_e_w1 _1215_ (
    .CK(clk),
    .D(value[10]),
    .E(_0015_),
    .Q(\words[1] [10]),
    .QN(_0382_)
  );
  flop_e_w1 _1216_ (
    .CK(clk),
    .D(value[11]),
    .E(_0015_),
    .Q(\words[1] [11]),
    .QN(_0381_)
  );
  flop_e_w1 _1217_ (
    .CK(clk),
    .D(value[12]),
    .E(_0015_),
    .Q(\words[1] [12]),
    .QN(_0380_)
  );
  flop_e_w1 _1218_ (
    .CK(clk),
    .D(value[13]),
    .E(_0015_),
    .Q(\words[1] [13]),
    .QN(_0379_)
  );
  flop_e_w1 _1219_ (
    .CK(clk),
    .D(value[14]),
    .E(_0015_),
    .Q(\words[1] [14]),
    .QN(_0378_)
  );
  flop_e_w1 _1220_ (
    .CK(clk),
    .D(value[15]),
    .E(_0015_),
    .Q(\words[1] [15]),
    .QN(_0618_)
  );
  flop_e_w1 _1221_ (
    .CK(clk),
    .D(value[0]),
    .E(_0019_),
    .Q(\words[0] [0]),
    .QN(_0377_)
  );
  flop_e_w1 _1222_ (
    .CK(clk),
    .D(value[1]),
    .E(_0019_),
    .Q(\words[0] [1]),
    .QN(_0376_)
  );
  flop_e_w1 _1223_ (
    .CK(clk),
    .D(value[2]),
    .E(_0019_),
    .Q(\words[0] [2]),
    .QN(_0375_)
  );
  flop_e_w1 _1224_ (
    .CK(clk),
    .D(value[3]),
    .E(_0019_),
    .Q(\words[0] [3]),
    .QN(_0374_)
  );
  flop_e_w1 _1225_ (
    .CK(clk),
    .D(value[4]),
    .E(_0019_),
    .Q(\words[0] [4]),
    .QN(_0373_)
  );
  flop_e_w1 _1226_ (
    .CK(clk),
    .D(value[5]),
    .E(_0019_),
    .Q(\words[0] [5]),
    .QN(_0372_)
  );
  flop_e_w1 _1227_ (
    .CK(clk),
    .D(value[6]),
    .E(_0019_),
    .Q(\words[0] [6]),
    .QN(_0371_)
  );
  flop_e_w1 _1228_ (
    .CK(clk),
    .D(value[7]),
    .E(_0019_),
    .Q(\words[0] [7]),
    .QN(_0370_)
  );
  flop_e_w1 _1229_ (
    .CK(clk),
    .D(value[8]),
    .E(_0019_),
    .Q(\words[0] [8]),
    .QN(_0369_)
  );
  flop_e_w1 _1230_ (
    .CK(clk),
    .D(value[9]),
    .E(_0019_),
    .Q(\words[0] [9]),
    .QN(_0368_)
  );
  flop_e_w1 _1231_ (
    .CK(clk),
    .D(value[10]),
    .E(_0019_),
    .Q(\words[0] [10]),
    .QN(_0367_)
  );
  flop_e_w1 _1232_ (
    .CK(clk),
    .D(value[11]),
    .E(_0019_),
    .Q(\words[0] [11]),
    .QN(_0366_)
  );
  flop_e_w1 _1233_ (
    .CK(clk),
    .D(value[12]),
    .E(_0019_),
    .Q(\words[0] [12]),
    .QN(_0365_)
  );
  flop_e_w1 _1234_ (
    .CK(clk),
    .D(value[13]),
    .E(_0019_),
    .Q(\words[0] [13]),
    .QN(_0364_)
  );
  flop_e_w1 _1235_ (
    .CK(clk),
    .D(value[14]),
    .E(_0019_),
    .Q(\words[0] [14]),
    .QN(_0363_)
  );
  flop_e_w1 _1236_ (
    .CK(clk),
    .D(value[15]),
    .E(_0019_),
    .Q(\words[0] [15]),
    .QN(_0619_)
  );
  flop_e_w1 _1237_ (
    .CK(clk),
    .D(_0346_[0]),
    .E(write),
    .Q(next[0]),
    .QN(_0346_[0])
  );
  flop_e_w1 _1238_ (
    .CK(clk),
    .D(_0347_[1]),
    .E(write),
    .Q(next[1]),
    .QN(_0016_)
  );
  flop_e_w1 _1239_ (
    .CK(clk),
    .D(_0347_[2]),
    .E(write),
    .Q(next[2]),
    .QN(_0017_)
  );
  flop_e_w1 _1240_ (
    .CK(clk),
    .D(_0347_[3]),
    .E(write),
    .Q(next[3]),
    .QN(_0018_)
  );
  flop_w1 _1241_ (
    .CK(clk),
    .D(_0000_[0]),
    .Q(found[0]),
    .QN(_0362_)
  );
  flop_w1 _1242_ (
    .CK(clk),
    .D(_0000_[1]),
    .Q(found[1]),
    .QN(_0361_)
  );
  flop_w1 _1243_ (
    .CK(clk),
    .D(_0000_[2]),
    .Q(found[2]),
    .QN(_0360_)
  );
  flop_w1 _1244_ (
    .CK(clk),
    .D(_0000_[3]),
    .Q(found[3]),
    .QN(_0359_)
  );
  flop_w1 _1245_ (
    .CK(clk),
    .D(_0000_[4]),
    .Q(found[4]),
    .QN(_0358_)
  );
  flop_w1 _1246_ (
    .CK(clk),
    .D(_0000_[5]),
    .Q(found[5]),
    .QN(_0357_)
  );
  flop_w1 _1247_ (
    .CK(clk),
    .D(_0000_[6]),
    .Q(found[6]),
    .QN(_0356_)
  );
  flop_w1 _1248_ (
    .CK(clk),
    .D(_0000_[7]),
    .Q(found[7]),
    .QN(_0355_)
  );
  flop_w1 _1249_ (
    .CK(clk),
    .D(_0000_[8]),
    .Q(found[8]),
    .QN(_0354_)
  );
  flop_w1 _1250_ (
    .CK(clk),
    .D(_0000_[9]),
    .Q(found[9]),
    .QN(_0353_)
  );
  flop_w1 _1251_ (
    .CK(clk),
    .D(_0000_[10]),
    .Q(found[10]),
    .QN(_0352_)
  );
  flop_w1 _1252_ (
    .CK(clk),
    .D(_0000_[11]),
    .Q(found[11]),
    .QN(_0351_)
  );
  flop_w1 _1253_ (
    .CK(clk),
    .D(_0000_[12]),
    .Q(found[12]),
    .QN(_0350_)
  );
  flop_w1 _1254_ (
    .CK(clk),
    .D(_0000_[13]),
    .Q(found[13]),
    .QN(_0349_)
  );
  flop_w1 _1255_ (
    .CK(clk),
    .D(_0000_[14]),
    .Q(found[14]),
    .QN(_0348_)
  );
  flop_w1 _1256_ (
    .CK(clk),
    .D(_0000_[15]),
    .Q(found[15]),
    .QN(_0603_)
  );
  assign _0346_[3:1] = next[3:1];
  assign _0347_[0] = _0346_[0];
endmodule

module tide_station(clk, probe_clk, phase_1, phase_2, rst_n, wake, probe, calibrate, calibration, sluice_limit, channel, read_log, log_address, bus, gate_open, gate_close, alarm, serial_out, beacon, parity_ok);
  input clk;
  wire clk;
  input probe_clk;
  wire probe_clk;
  input phase_1;
  wire phase_1;
  input phase_2;
  wire phase_2;
  input rst_n;
  wire rst_n;
  input wake;
  wire wake;
  input [3:0] probe;
  wire [3:0] probe;
  input calibrate;
  wire calibrate;
  input [3:0] calibration;
  wire [3:0] calibration;
  input [1:0] sluice_limit;
  wire [1:0] sluice_limit;
  input [1:0] channel;
  wire [1:0] channel;
  input read_log;
  wire read_log;
  input [3:0] log_address;
  wire [3:0] log_address;
  output [7:0] bus;
  wire [7:0] bus;
  output gate_open;
  wire gate_open;
  output gate_close;
  wire gate_close;
  output alarm;
  wire alarm;
  output serial_out;
  wire serial_out;
  output beacon;
  wire beacon;
  output parity_ok;
  wire parity_ok;
  wire [5:0] _000_;
  wire _001_;
  wire _002_;
  wire _003_;
  wire _004_;
  wire _005_;
  wire _006_;
  wire _007_;
  wire _008_;
  wire _009_;
  wire _010_;
  wire _011_;
  wire _012_;
  wire _013_;
  wire _014_;
  wire _015_;
  wire _016_;
  wire _017_;
  wire _018_;
  wire _019_;
  wire _020_;
  wire _021_;
  wire _022_;
  wire _023_;
  wire _024_;
  wire _025_;
  wire _026_;
  wire _027_;
  wire _028_;
  wire _029_;
  wire _030_;
  wire _031_;
  wire _032_;
  wire _033_;
  wire _034_;
  wire _035_;
  wire _036_;
  wire _037_;
  wire _038_;
  wire _039_;
  wire _040_;
  wire _041_;
  wire _042_;
  wire _043_;
  wire _044_;
  wire _045_;
  wire _046_;
  wire _047_;
  wire _048_;
  wire _049_;
  wire _050_;
  wire _051_;
  wire _052_;
  wire _053_;
  wire _054_;
  wire _055_;
  wire _056_;
  wire _057_;
  wire _058_;
  wire _059_;
  wire _060_;
  wire _061_;
  wire _062_;
  wire _063_;
  wire _064_;
  wire _065_;
  wire _066_;
  wire _067_;
  wire _068_;
  wire _069_;
  wire _070_;
  wire _071_;
  wire _072_;
  wire _073_;
  wire _074_;
  wire _075_;
  wire _076_;
  wire _077_;
  wire _078_;
  wire _079_;
  wire _080_;
  wire _081_;
  wire _082_;
  wire _083_;
  wire _084_;
  wire _085_;
  wire _086_;
  wire _087_;
  wire _088_;
  wire _089_;
  wire _090_;
  wire _091_;
  wire _092_;
  wire _093_;
  wire _094_;
  wire _095_;
  wire _096_;
  wire _097_;
  wire _098_;
  wire _099_;
  wire _100_;
  wire _101_;
  wire _102_;
  wire _103_;
  wire _104_;
  wire _105_;
  wire _106_;
  wire _107_;
  wire _108_;
  wire _109_;
  wire _110_;
  wire _111_;
  wire _112_;
  wire _113_;
  wire _114_;
  wire _115_;
  wire _116_;
  wire _117_;
  wire _118_;
  wire _119_;
  wire _120_;
  wire _121_;
  wire _122_;
  wire _123_;
  wire _124_;
  wire _125_;
  wire _126_;
  wire _127_;
  wire _128_;
  wire _129_;
  wire _130_;
  wire _131_;
  wire _132_;
  wire _133_;
  wire _134_;
  wire _135_;
  wire _136_;
  wire _137_;
  wire _138_;
  wire _139_;
  wire _140_;
  wire _141_;
  wire _142_;
  wire _143_;
  wire _144_;
  wire _145_;
  wire _146_;
  wire _147_;
  wire _148_;
  wire _149_;
  wire _150_;
  wire _151_;
  wire _152_;
  wire _153_;
  wire _154_;
  wire _155_;
  wire _156_;
  wire _157_;
  wire _158_;
  wire _159_;
  wire _160_;
  wire _161_;
  wire _162_;
  wire _163_;
  wire _164_;
  wire _165_;
  wire _166_;
  wire _167_;
  wire _168_;
  wire _169_;
  wire _170_;
  wire _171_;
  wire _172_;
  wire _173_;
  wire _174_;
  wire _175_;
  wire _176_;
  wire _177_;
  wire _178_;
  wire _179_;
  wire _180_;
  wire _181_;
  wire _182_;
  wire _183_;
  wire _184_;
  wire _185_;
  wire _186_;
  wire _187_;
  wire _188_;
  wire _189_;
  wire _190_;
  wire _191_;
  wire _192_;
  wire _193_;
  wire _194_;
  wire _195_;
  wire _196_;
  wire _197_;
  wire _198_;
  wire clear_n;
  wire [3:0] fresh;
  wire from_guard;
  wire from_level;
  wire [3:0] high;
  wire [11:0] level;
  wire [11:0] level0;
  wire [11:0] level1;
  wire [11:0] level2;
  wire [11:0] level3;
  wire [15:0] logged;
  wire quiet_clk;
  wire [7:0] safe;
  wire [5:0] seconds;
  wire slow_clk;
  wire soft_clear;
  wire [13:0] sum;
  inv_w1 _199_ (
    .A(calibrate),
    .Y(_003_)
  );
  inv_w1 _200_ (
    .A(rst_n),
    .Y(_004_)
  );
  xor2_w1 _201_ (
    .A(level0[1]),
    .B(level1[1]),
    .Y(_013_)
  );
  xnor2_w1 _202_ (
    .A(level2[8]),
    .B(_095_),
    .Y(_097_)
  );
  or2_w1 _203_ (
    .A(_093_),
    .B(_097_),
    .Y(_098_)
  );
  xor2_w1 _204_ (
    .A(_093_),
    .B(_097_),
    .Y(_099_)
  );
  nand2_w1 _205_ (
    .A(level3[8]),
    .B(_099_),
    .Y(_100_)
  );
  xnor2_w1 _206_ (
    .A(level3[8]),
    .B(_099_),
    .Y(_101_)
  );
  and_nor21_w1 _207_ (
    .A(_085_),
    .B(_087_),
    .C(_101_),
    .Y(_102_)
  );
  inv_w1 _208_ (
    .A(_102_),
    .Y(_103_)
  );
  and3_w1 _209_ (
    .A(_085_),
    .B(_087_),
    .C(_101_),
    .Y(_104_)
  );
  nor2_w1 _210_ (
    .A(_102_),
    .B(_104_),
    .Y(_105_)
  );
  or_nand21_w1 _211_ (
    .A(_080_),
    .B(_089_),
    .C(_091_),
    .Y(_106_)
  );
  xnor2_w1 _212_ (
    .A(level2[1]),
    .B(_013_),
    .Y(_014_)
  );
  xnor2_w1 _213_ (
    .A(_105_),
    .B(_106_),
    .Y(sum[8])
  );
  or_nand21_w1 _214_ (
    .A(_104_),
    .B(_106_),
    .C(_103_),
    .Y(_107_)
  );
  and2_w1 _215_ (
    .A(level0[9]),
    .B(level1[9]),
    .Y(_108_)
  );
  xor2_w1 _216_ (
    .A(level0[9]),
    .B(level1[9]),
    .Y(_109_)
  );
  and2_w1 _217_ (
    .A(level2[9]),
    .B(_109_),
    .Y(_110_)
  );
  xnor2_w1 _218_ (
    .A(level2[9]),
    .B(_109_),
    .Y(_111_)
  );
  and_nor21_w1 _219_ (
    .A(_094_),
    .B(_096_),
    .C(_111_),
    .Y(_112_)
  );
  and3_w1 _220_ (
    .A(_094_),
    .B(_096_),
    .C(_111_),
    .Y(_113_)
  );
  nor2_w1 _221_ (
    .A(_112_),
    .B(_113_),
    .Y(_114_)
  );
  xnor2_w1 _222_ (
    .A(level3[9]),
    .B(_114_),
    .Y(_115_)
  );
  nor2_w1 _223_ (
    .A(_011_),
    .B(_014_),
    .Y(_015_)
  );
  and_nor21_w1 _224_ (
    .A(_098_),
    .B(_100_),
    .C(_115_),
    .Y(_116_)
  );
  and3_w1 _225_ (
    .A(_098_),
    .B(_100_),
    .C(_115_),
    .Y(_117_)
  );
  nor2_w1 _226_ (
    .A(_116_),
    .B(_117_),
    .Y(_118_)
  );
  xor2_w1 _227_ (
    .A(_107_),
    .B(_118_),
    .Y(sum[9])
  );
  and_nor21_w1 _228_ (
    .A(_107_),
    .B(_118_),
    .C(_116_),
    .Y(_119_)
  );
  and_nor21_w1 _229_ (
    .A(level3[9]),
    .B(_114_),
    .C(_112_),
    .Y(_120_)
  );
  nand2_w1 _230_ (
    .A(level0[10]),
    .B(level1[10]),
    .Y(_121_)
  );
  xor2_w1 _231_ (
    .A(level0[10]),
    .B(level1[10]),
    .Y(_122_)
  );
  nand2_w1 _232_ (
    .A(level2[10]),
    .B(_122_),
    .Y(_123_)
  );
  xor2_w1 _233_ (
    .A(level2[10]),
    .B(_122_),
    .Y(_124_)
  );
  xor2_w1 _234_ (
    .A(_011_),
    .B(_014_),
    .Y(_016_)
  );
  or_nand21_w1 _235_ (
    .A(_108_),
    .B(_110_),
    .C(_124_),
    .Y(_125_)
  );
  or3_w1 _236_ (
    .A(_108_),
    .B(_110_),
    .C(_124_),
    .Y(_126_)
  );
  and2_w1 _237_ (
    .A(_125_),
    .B(_126_),
    .Y(_127_)
  );
  nand2_w1 _238_ (
    .A(level3[10]),
    .B(_127_),
    .Y(_128_)
  );
  xnor2_w1 _239_ (
    .A(level3[10]),
    .B(_127_),
    .Y(_129_)
  );
  or2_w1 _240_ (
    .A(_120_),
    .B(_129_),
    .Y(_130_)
  );
  and2_w1 _241_ (
    .A(_120_),
    .B(_129_),
    .Y(_131_)
  );
  xor2_w1 _242_ (
    .A(_120_),
    .B(_129_),
    .Y(_132_)
  );
  xnor2_w1 _243_ (
    .A(_119_),
    .B(_132_),
    .Y(sum[10])
  );
  or_nand21_w1 _244_ (
    .A(_119_),
    .B(_131_),
    .C(_130_),
    .Y(_133_)
  );
  xnor2_w1 _245_ (
    .A(level3[1]),
    .B(_016_),
    .Y(_017_)
  );
  and2_w1 _246_ (
    .A(level0[11]),
    .B(level1[11]),
    .Y(_134_)
  );
  xor2_w1 _247_ (
    .A(level0[11]),
    .B(level1[11]),
    .Y(_135_)
  );
  xnor2_w1 _248_ (
    .A(level2[11]),
    .B(_135_),
    .Y(_136_)
  );
  and_nor21_w1 _249_ (
    .A(_121_),
    .B(_123_),
    .C(_136_),
    .Y(_137_)
  );
  and3_w1 _250_ (
    .A(_121_),
    .B(_123_),
    .C(_136_),
    .Y(_138_)
  );
  nor2_w1 _251_ (
    .A(_137_),
    .B(_138_),
    .Y(_139_)
  );
  xnor2_w1 _252_ (
    .A(level3[11]),
    .B(_139_),
    .Y(_140_)
  );
  and_nor21_w1 _253_ (
    .A(_125_),
    .B(_128_),
    .C(_140_),
    .Y(_141_)
  );
  and3_w1 _254_ (
    .A(_125_),
    .B(_128_),
    .C(_140_),
    .Y(_142_)
  );
  nand3_w1 _255_ (
    .A(_125_),
    .B(_128_),
    .C(_140_),
    .Y(_143_)
  );
  or2_w1 _256_ (
    .A(_010_),
    .B(_017_),
    .Y(_018_)
  );
  nor2_w1 _257_ (
    .A(_141_),
    .B(_142_),
    .Y(_144_)
  );
  xor2_w1 _258_ (
    .A(_133_),
    .B(_144_),
    .Y(sum[11])
  );
  and_nor21_w1 _259_ (
    .A(level2[11]),
    .B(_135_),
    .C(_134_),
    .Y(_145_)
  );
  and_nor21_w1 _260_ (
    .A(level3[11]),
    .B(_139_),
    .C(_137_),
    .Y(_146_)
  );
  or2_w1 _261_ (
    .A(_145_),
    .B(_146_),
    .Y(_147_)
  );
  and2_w1 _262_ (
    .A(_145_),
    .B(_146_),
    .Y(_148_)
  );
  xor2_w1 _263_ (
    .A(_145_),
    .B(_146_),
    .Y(_149_)
  );
  or_nand21_w1 _264_ (
    .A(_133_),
    .B(_141_),
    .C(_143_),
    .Y(_150_)
  );
  xnor2_w1 _265_ (
    .A(_149_),
    .B(_150_),
    .Y(sum[12])
  );
  or_nand21_w1 _266_ (
    .A(_148_),
    .B(_150_),
    .C(_147_),
    .Y(sum[13])
  );
  and_nor21_w1 _267_ (
    .A(level3[1]),
    .B(_016_),
    .C(_015_),
    .Y(_019_)
  );
  or4_w1 _268_ (
    .A(fresh[2]),
    .B(fresh[3]),
    .C(fresh[0]),
    .D(fresh[1]),
    .Y(_002_)
  );
  xor2_w1 _269_ (
    .A(_010_),
    .B(_017_),
    .Y(sum[1])
  );
  nor2_w1 _270_ (
    .A(calibrate),
    .B(read_log),
    .Y(from_level)
  );
  xor2_w1 _271_ (
    .A(safe[3]),
    .B(safe[4]),
    .Y(_151_)
  );
  xor2_w1 _272_ (
    .A(safe[5]),
    .B(safe[6]),
    .Y(_152_)
  );
  xnor2_w1 _273_ (
    .A(_151_),
    .B(_152_),
    .Y(_153_)
  );
  xor2_w1 _274_ (
    .A(safe[1]),
    .B(safe[2]),
    .Y(_154_)
  );
  xnor2_w1 _275_ (
    .A(seconds[0]),
    .B(safe[0]),
    .Y(_155_)
  );
  xnor2_w1 _276_ (
    .A(_154_),
    .B(_155_),
    .Y(_156_)
  );
  xnor2_w1 _277_ (
    .A(_153_),
    .B(_156_),
    .Y(_157_)
  );
  and_nor21_w1 _278_ (
    .A(level2[1]),
    .B(_013_),
    .C(_012_),
    .Y(_020_)
  );
  xnor2_w1 _279_ (
    .A(safe[7]),
    .B(_157_),
    .Y(parity_ok)
  );
  mux2_w1 _280_ (
    .A(level2[10]),
    .B(level3[10]),
    .S(channel[0]),
    .Y(_158_)
  );
  mux2_w1 _281_ (
    .A(level0[10]),
    .B(level1[10]),
    .S(channel[0]),
    .Y(_159_)
  );
  mux2_w1 _282_ (
    .A(_159_),
    .B(_158_),
    .S(channel[1]),
    .Y(level[10])
  );
  mux2_w1 _283_ (
    .A(level2[9]),
    .B(level3[9]),
    .S(channel[0]),
    .Y(_160_)
  );
  mux2_w1 _284_ (
    .A(level0[9]),
    .B(level1[9]),
    .S(channel[0]),
    .Y(_161_)
  );
  mux2_w1 _285_ (
    .A(_161_),
    .B(_160_),
    .S(channel[1]),
    .Y(level[9])
  );
  mux2_w1 _286_ (
    .A(level2[8]),
    .B(level3[8]),
    .S(channel[0]),
    .Y(_162_)
  );
  mux2_w1 _287_ (
    .A(level0[8]),
    .B(level1[8]),
    .S(channel[0]),
    .Y(_163_)
  );
  mux2_w1 _288_ (
    .A(_163_),
    .B(_162_),
    .S(channel[1]),
    .Y(level[8])
  );
  and2_w1 _289_ (
    .A(level0[2]),
    .B(level1[2]),
    .Y(_021_)
  );
  mux2_w1 _290_ (
    .A(level2[11]),
    .B(level3[11]),
    .S(channel[0]),
    .Y(_164_)
  );
  mux2_w1 _291_ (
    .A(level0[11]),
    .B(level1[11]),
    .S(channel[0]),
    .Y(_165_)
  );
  mux2_w1 _292_ (
    .A(_165_),
    .B(_164_),
    .S(channel[1]),
    .Y(level[11])
  );
  xnor2_w1 _293_ (
    .A(level3[0]),
    .B(_008_),
    .Y(sum[0])
  );
  nor2_w1 _294_ (
    .A(_004_),
    .B(soft_clear),
    .Y(clear_n)
  );
  nor2_w1 _295_ (
    .A(_003_),
    .B(read_log),
    .Y(from_guard)
  );
  mux2_w1 _296_ (
    .A(level2[0]),
    .B(level3[0]),
    .S(channel[0]),
    .Y(_166_)
  );
  mux2_w1 _297_ (
    .A(level0[0]),
    .B(level1[0]),
    .S(channel[0]),
    .Y(_167_)
  );
  mux2_w1 _298_ (
    .A(_167_),
    .B(_166_),
    .S(channel[1]),
    .Y(level[0])
  );
  mux2_w1 _299_ (
    .A(level2[1]),
    .B(level3[1]),
    .S(channel[0]),
    .Y(_168_)
  );
  xor2_w1 _300_ (
    .A(level0[2]),
    .B(level1[2]),
    .Y(_022_)
  );
  mux2_w1 _301_ (
    .A(level0[1]),
    .B(level1[1]),
    .S(channel[0]),
    .Y(_169_)
  );
  mux2_w1 _302_ (
    .A(_169_),
    .B(_168_),
    .S(channel[1]),
    .Y(level[1])
  );
  mux2_w1 _303_ (
    .A(level2[2]),
    .B(level3[2]),
    .S(channel[0]),
    .Y(_170_)
  );
  mux2_w1 _304_ (
    .A(level0[2]),
    .B(level1[2]),
    .S(channel[0]),
    .Y(_171_)
  );
  mux2_w1 _305_ (
    .A(_171_),
    .B(_170_),
    .S(channel[1]),
    .Y(level[2])
  );
  mux2_w1 _306_ (
    .A(level2[3]),
    .B(level3[3]),
    .S(channel[0]),
    .Y(_172_)
  );
  mux2_w1 _307_ (
    .A(level0[3]),
    .B(level1[3]),
    .S(channel[0]),
    .Y(_173_)
  );
  mux2_w1 _308_ (
    .A(_173_),
    .B(_172_),
    .S(channel[1]),
    .Y(level[3])
  );
  mux2_w1 _309_ (
    .A(level2[4]),
    .B(level3[4]),
    .S(channel[0]),
    .Y(_174_)
  );
  mux2_w1 _310_ (
    .A(level0[4]),
    .B(level1[4]),
    .S(channel[0]),
    .Y(_175_)
  );
  inv_w1 _311_ (
    .A(seconds[1]),
    .Y(_005_)
  );
  xnor2_w1 _312_ (
    .A(level2[2]),
    .B(_022_),
    .Y(_023_)
  );
  mux2_w1 _313_ (
    .A(_175_),
    .B(_174_),
    .S(channel[1]),
    .Y(level[4])
  );
  mux2_w1 _314_ (
    .A(level2[5]),
    .B(level3[5]),
    .S(channel[0]),
    .Y(_176_)
  );
  mux2_w1 _315_ (
    .A(level0[5]),
    .B(level1[5]),
    .S(channel[0]),
    .Y(_177_)
  );
  mux2_w1 _316_ (
    .A(_177_),
    .B(_176_),
    .S(channel[1]),
    .Y(level[5])
  );
  mux2_w1 _317_ (
    .A(level2[6]),
    .B(level3[6]),
    .S(channel[0]),
    .Y(_178_)
  );
  mux2_w1 _318_ (
    .A(level0[6]),
    .B(level1[6]),
    .S(channel[0]),
    .Y(_179_)
  );
  mux2_w1 _319_ (
    .A(_179_),
    .B(_178_),
    .S(channel[1]),
    .Y(level[6])
  );
  mux2_w1 _320_ (
    .A(level2[7]),
    .B(level3[7]),
    .S(channel[0]),
    .Y(_180_)
  );
  mux2_w1 _321_ (
    .A(level0[7]),
    .B(level1[7]),
    .S(channel[0]),
    .Y(_181_)
  );
  mux2_w1 _322_ (
    .A(_181_),
    .B(_180_),
    .S(channel[1]),
    .Y(level[7])
  );
  or2_w1 _323_ (
    .A(_020_),
    .B(_023_),
    .Y(_024_)
  );
  nand2_w1 _324_ (
    .A(seconds[0]),
    .B(seconds[1]),
    .Y(_182_)
  );
  nand3_w1 _325_ (
    .A(seconds[4]),
    .B(seconds[3]),
    .C(seconds[5]),
    .Y(_183_)
  );
  nor3_w1 _326_ (
    .A(seconds[2]),
    .B(_182_),
    .C(_183_),
    .Y(_184_)
  );
  and3_w1 _327_ (
    .A(seconds[0]),
    .B(seconds[2]),
    .C(seconds[1]),
    .Y(_185_)
  );
  and2_w1 _328_ (
    .A(seconds[3]),
    .B(_185_),
    .Y(_186_)
  );
  xnor2_w1 _329_ (
    .A(seconds[4]),
    .B(_186_),
    .Y(_187_)
  );
  nor2_w1 _330_ (
    .A(_184_),
    .B(_187_),
    .Y(_000_[4])
  );
  nor2_w1 _331_ (
    .A(seconds[3]),
    .B(_185_),
    .Y(_188_)
  );
  nor3_w1 _332_ (
    .A(_184_),
    .B(_186_),
    .C(_188_),
    .Y(_000_[3])
  );
  and_nor21_w1 _333_ (
    .A(seconds[0]),
    .B(seconds[1]),
    .C(seconds[2]),
    .Y(_189_)
  );
  xor2_w1 _334_ (
    .A(_020_),
    .B(_023_),
    .Y(_025_)
  );
  nor3_w1 _335_ (
    .A(_184_),
    .B(_185_),
    .C(_189_),
    .Y(_000_[2])
  );
  xor2_w1 _336_ (
    .A(seconds[0]),
    .B(seconds[1]),
    .Y(_000_[1])
  );
  nor4_w1 _337_ (
    .A(seconds[0]),
    .B(seconds[2]),
    .C(_005_),
    .D(_183_),
    .Y(_001_)
  );
  and_nor21_w1 _338_ (
    .A(seconds[4]),
    .B(_186_),
    .C(seconds[5]),
    .Y(_190_)
  );
  nor2_w1 _339_ (
    .A(_182_),
    .B(_183_),
    .Y(_191_)
  );
  nor2_w1 _340_ (
    .A(_190_),
    .B(_191_),
    .Y(_000_[5])
  );
  nand2_w1 _341_ (
    .A(level3[2]),
    .B(_025_),
    .Y(_026_)
  );
  xnor2_w1 _342_ (
    .A(level3[2]),
    .B(_025_),
    .Y(_027_)
  );
  or2_w1 _343_ (
    .A(_019_),
    .B(_027_),
    .Y(_028_)
  );
  xnor2_w1 _344_ (
    .A(_019_),
    .B(_027_),
    .Y(_029_)
  );
  xor2_w1 _345_ (
    .A(_018_),
    .B(_029_),
    .Y(sum[2])
  );
  or_nand21_w1 _346_ (
    .A(_018_),
    .B(_029_),
    .C(_028_),
    .Y(_030_)
  );
  nand2_w1 _347_ (
    .A(_024_),
    .B(_026_),
    .Y(_031_)
  );
  and2_w1 _348_ (
    .A(level0[0]),
    .B(level1[0]),
    .Y(_006_)
  );
  and_nor21_w1 _349_ (
    .A(level2[2]),
    .B(_022_),
    .C(_021_),
    .Y(_032_)
  );
  and2_w1 _350_ (
    .A(level0[3]),
    .B(level1[3]),
    .Y(_033_)
  );
  xor2_w1 _351_ (
    .A(level0[3]),
    .B(level1[3]),
    .Y(_034_)
  );
  xnor2_w1 _352_ (
    .A(level2[3]),
    .B(_034_),
    .Y(_035_)
  );
  or2_w1 _353_ (
    .A(_032_),
    .B(_035_),
    .Y(_036_)
  );
  xor2_w1 _354_ (
    .A(_032_),
    .B(_035_),
    .Y(_037_)
  );
  nand2_w1 _355_ (
    .A(level3[3]),
    .B(_037_),
    .Y(_038_)
  );
  xnor2_w1 _356_ (
    .A(level3[3]),
    .B(_037_),
    .Y(_039_)
  );
  and_nor21_w1 _357_ (
    .A(_024_),
    .B(_026_),
    .C(_039_),
    .Y(_040_)
  );
  xnor2_w1 _358_ (
    .A(_031_),
    .B(_039_),
    .Y(_041_)
  );
  xor2_w1 _359_ (
    .A(level0[0]),
    .B(level1[0]),
    .Y(_007_)
  );
  xor2_w1 _360_ (
    .A(_030_),
    .B(_041_),
    .Y(sum[3])
  );
  and_nor21_w1 _361_ (
    .A(_030_),
    .B(_041_),
    .C(_040_),
    .Y(_042_)
  );
  nand2_w1 _362_ (
    .A(_036_),
    .B(_038_),
    .Y(_043_)
  );
  and_nor21_w1 _363_ (
    .A(level2[3]),
    .B(_034_),
    .C(_033_),
    .Y(_044_)
  );
  and2_w1 _364_ (
    .A(level0[4]),
    .B(level1[4]),
    .Y(_045_)
  );
  xor2_w1 _365_ (
    .A(level0[4]),
    .B(level1[4]),
    .Y(_046_)
  );
  xnor2_w1 _366_ (
    .A(level2[4]),
    .B(_046_),
    .Y(_047_)
  );
  or2_w1 _367_ (
    .A(_044_),
    .B(_047_),
    .Y(_048_)
  );
  xor2_w1 _368_ (
    .A(_044_),
    .B(_047_),
    .Y(_049_)
  );
  nand2_w1 _369_ (
    .A(level3[4]),
    .B(_049_),
    .Y(_050_)
  );
  xnor2_w1 _370_ (
    .A(level2[0]),
    .B(_007_),
    .Y(_008_)
  );
  xnor2_w1 _371_ (
    .A(level3[4]),
    .B(_049_),
    .Y(_051_)
  );
  and_nor21_w1 _372_ (
    .A(_036_),
    .B(_038_),
    .C(_051_),
    .Y(_052_)
  );
  inv_w1 _373_ (
    .A(_052_),
    .Y(_053_)
  );
  xor2_w1 _374_ (
    .A(_043_),
    .B(_051_),
    .Y(_054_)
  );
  xor2_w1 _375_ (
    .A(_042_),
    .B(_054_),
    .Y(sum[4])
  );
  or_nand21_w1 _376_ (
    .A(_042_),
    .B(_054_),
    .C(_053_),
    .Y(_055_)
  );
  and_nor21_w1 _377_ (
    .A(level2[4]),
    .B(_046_),
    .C(_045_),
    .Y(_056_)
  );
  and2_w1 _378_ (
    .A(level0[5]),
    .B(level1[5]),
    .Y(_057_)
  );
  xor2_w1 _379_ (
    .A(level0[5]),
    .B(level1[5]),
    .Y(_058_)
  );
  xnor2_w1 _380_ (
    .A(level2[5]),
    .B(_058_),
    .Y(_059_)
  );
  inv_w1 _381_ (
    .A(_008_),
    .Y(_009_)
  );
  or2_w1 _382_ (
    .A(_056_),
    .B(_059_),
    .Y(_060_)
  );
  xor2_w1 _383_ (
    .A(_056_),
    .B(_059_),
    .Y(_061_)
  );
  nand2_w1 _384_ (
    .A(level3[5]),
    .B(_061_),
    .Y(_062_)
  );
  xnor2_w1 _385_ (
    .A(level3[5]),
    .B(_061_),
    .Y(_063_)
  );
  and_nor21_w1 _386_ (
    .A(_048_),
    .B(_050_),
    .C(_063_),
    .Y(_064_)
  );
  and3_w1 _387_ (
    .A(_048_),
    .B(_050_),
    .C(_063_),
    .Y(_065_)
  );
  nor2_w1 _388_ (
    .A(_064_),
    .B(_065_),
    .Y(_066_)
  );
  xor2_w1 _389_ (
    .A(_055_),
    .B(_066_),
    .Y(sum[5])
  );
  and_nor21_w1 _390_ (
    .A(_055_),
    .B(_066_),
    .C(_064_),
    .Y(_067_)
  );
  and_nor21_w1 _391_ (
    .A(level2[5]),
    .B(_058_),
    .C(_057_),
    .Y(_068_)
  );
  nand2_w1 _392_ (
    .A(level3[0]),
    .B(_009_),
    .Y(_010_)
  );
  and2_w1 _393_ (
    .A(level0[6]),
    .B(level1[6]),
    .Y(_069_)
  );
  xor2_w1 _394_ (
    .A(level0[6]),
    .B(level1[6]),
    .Y(_070_)
  );
  xnor2_w1 _395_ (
    .A(level2[6]),
    .B(_070_),
    .Y(_071_)
  );
  or2_w1 _396_ (
    .A(_068_),
    .B(_071_),
    .Y(_072_)
  );
  xor2_w1 _397_ (
    .A(_068_),
    .B(_071_),
    .Y(_073_)
  );
  nand2_w1 _398_ (
    .A(level3[6]),
    .B(_073_),
    .Y(_074_)
  );
  xnor2_w1 _399_ (
    .A(level3[6]),
    .B(_073_),
    .Y(_075_)
  );
  and_nor21_w1 _400_ (
    .A(_060_),
    .B(_062_),
    .C(_075_),
    .Y(_076_)
  );
  inv_w1 _401_ (
    .A(_076_),
    .Y(_077_)
  );
  nand3_w1 _402_ (
    .A(_060_),
    .B(_062_),
    .C(_075_),
    .Y(_078_)
  );
  and_nor21_w1 _403_ (
    .A(level2[0]),
    .B(_007_),
    .C(_006_),
    .Y(_011_)
  );
  nand2_w1 _404_ (
    .A(_077_),
    .B(_078_),
    .Y(_079_)
  );
  xor2_w1 _405_ (
    .A(_067_),
    .B(_079_),
    .Y(sum[6])
  );
  or_nand21_w1 _406_ (
    .A(_067_),
    .B(_079_),
    .C(_077_),
    .Y(_080_)
  );
  and_nor21_w1 _407_ (
    .A(level2[6]),
    .B(_070_),
    .C(_069_),
    .Y(_081_)
  );
  and2_w1 _408_ (
    .A(level0[7]),
    .B(level1[7]),
    .Y(_082_)
  );
  xor2_w1 _409_ (
    .A(level0[7]),
    .B(level1[7]),
    .Y(_083_)
  );
  xnor2_w1 _410_ (
    .A(level2[7]),
    .B(_083_),
    .Y(_084_)
  );
  or2_w1 _411_ (
    .A(_081_),
    .B(_084_),
    .Y(_085_)
  );
  xor2_w1 _412_ (
    .A(_081_),
    .B(_084_),
    .Y(_086_)
  );
  nand2_w1 _413_ (
    .A(level3[7]),
    .B(_086_),
    .Y(_087_)
  );
  and2_w1 _414_ (
    .A(level0[1]),
    .B(level1[1]),
    .Y(_012_)
  );
  xnor2_w1 _415_ (
    .A(level3[7]),
    .B(_086_),
    .Y(_088_)
  );
  and_nor21_w1 _416_ (
    .A(_072_),
    .B(_074_),
    .C(_088_),
    .Y(_089_)
  );
  inv_w1 _417_ (
    .A(_089_),
    .Y(_090_)
  );
  nand3_w1 _418_ (
    .A(_072_),
    .B(_074_),
    .C(_088_),
    .Y(_091_)
  );
  nand2_w1 _419_ (
    .A(_090_),
    .B(_091_),
    .Y(_092_)
  );
  xnor2_w1 _420_ (
    .A(_080_),
    .B(_092_),
    .Y(sum[7])
  );
  and_nor21_w1 _421_ (
    .A(level2[7]),
    .B(_083_),
    .C(_082_),
    .Y(_093_)
  );
  nand2_w1 _422_ (
    .A(level0[8]),
    .B(level1[8]),
    .Y(_094_)
  );
  xor2_w1 _423_ (
    .A(level0[8]),
    .B(level1[8]),
    .Y(_095_)
  );
  nand2_w1 _424_ (
    .A(level2[8]),
    .B(_095_),
    .Y(_096_)
  );
  flop_r_w1 _425_ (
    .CK(clk),
    .D(_001_),
    .Q(soft_clear),
    .QN(_195_),
    .RN(rst_n)
  );
  flop_r_w1 _426_ (
    .CK(clk),
    .D(_000_[0]),
    .Q(seconds[0]),
    .QN(_000_[0]),
    .RN(rst_n)
  );
  flop_r_w1 _427_ (
    .CK(clk),
    .D(_000_[1]),
    .Q(seconds[1]),
    .QN(_196_),
    .RN(rst_n)
  );
  flop_r_w1 _428_ (
    .CK(clk),
    .D(_000_[2]),
    .Q(seconds[2]),
    .QN(_194_),
    .RN(rst_n)
  );
  flop_r_w1 _429_ (
    .CK(clk),
    .D(_000_[3]),
    .Q(seconds[3]),
    .QN(_192_),
    .RN(rst_n)
  );
  flop_r_w1 _430_ (
    .CK(clk),
    .D(_000_[4]),
    .Q(seconds[4]),
    .QN(_193_),
    .RN(rst_n)
  );
  flop_r_w1 _431_ (
    .CK(clk),
    .D(_000_[5]),
    .Q(seconds[5]),
    .QN(_197_),
    .RN(rst_n)
  );
  tie_low _432_ (
    .Y(_198_)
  );
  slow_clock divider (
    .clk(clk),
    .rst_n(rst_n),
    .slow(slow_clk)
  );
  clock_gate_test_w4 doze (
    .CK(clk),
    .E(wake),
    .GCK(quiet_clk),
    .T(_198_)
  );
  bus_drive_w2 \drive_guard[0]  (
    .A(safe[0]),
    .E(from_guard),
    .Y(bus[0])
  );
  bus_drive_w2 \drive_guard[1]  (
    .A(safe[1]),
    .E(from_guard),
    .Y(bus[1])
  );
  bus_drive_w2 \drive_guard[2]  (
    .A(safe[2]),
    .E(from_guard),
    .Y(bus[2])
  );
  bus_drive_w2 \drive_guard[3]  (
    .A(safe[3]),
    .E(from_guard),
    .Y(bus[3])
  );
  bus_drive_w2 \drive_guard[4]  (
    .A(safe[4]),
    .E(from_guard),
    .Y(bus[4])
  );
  bus_drive_w2 \drive_guard[5]  (
    .A(safe[5]),
    .E(from_guard),
    .Y(bus[5])
  );
  bus_drive_w2 \drive_guard[6]  (
    .A(safe[6]),
    .E(from_guard),
    .Y(bus[6])
  );
  bus_drive_w2 \drive_guard[7]  (
    .A(safe[7]),
    .E(from_guard),
    .Y(bus[7])
  );
  bus_drive_w2 \drive_level[0]  (
    .A(level[4]),
    .E(from_level),
    .Y(bus[0])
  );
  bus_drive_w2 \drive_level[1]  (
    .A(level[5]),
    .E(from_level),
    .Y(bus[1])
  );
  bus_drive_w2 \drive_level[2]  (
    .A(level[6]),
    .E(from_level),
    .Y(bus[2])
  );
  bus_drive_w2 \drive_level[3]  (
    .A(level[7]),
    .E(from_level),
    .Y(bus[3])
  );
  bus_drive_w2 \drive_level[4]  (
    .A(level[8]),
    .E(from_level),
    .Y(bus[4])
  );
  bus_drive_w2 \drive_level[5]  (
    .A(level[9]),
    .E(from_level),
    .Y(bus[5])
  );
  bus_drive_w2 \drive_level[6]  (
    .A(level[10]),
    .E(from_level),
    .Y(bus[6])
  );
  bus_drive_w2 \drive_level[7]  (
    .A(level[11]),
    .E(from_level),
    .Y(bus[7])
  );
  bus_drive_w2 \drive_log[0]  (
    .A(logged[0]),
    .E(read_log),
    .Y(bus[0])
  );
  bus_drive_w2 \drive_log[1]  (
    .A(logged[1]),
    .E(read_log),
    .Y(bus[1])
  );
  bus_drive_w2 \drive_log[2]  (
    .A(logged[2]),
    .E(read_log),
    .Y(bus[2])
  );
  bus_drive_w2 \drive_log[3]  (
    .A(logged[3]),
    .E(read_log),
    .Y(bus[3])
  );
  bus_drive_w2 \drive_log[4]  (
    .A(logged[4]),
    .E(read_log),
    .Y(bus[4])
  );
  bus_drive_w2 \drive_log[5]  (
    .A(logged[5]),
    .E(read_log),
    .Y(bus[5])
  );
  bus_drive_w2 \drive_log[6]  (
    .A(logged[6]),
    .E(read_log),
    .Y(bus[6])
  );
  bus_drive_w2 \drive_log[7]  (
    .A(logged[7]),
    .E(read_log),
    .Y(bus[7])
  );
  gauge_channel gauge0 (
    .calibrate(calibrate),
    .calibration(calibration),
    .clk(quiet_clk),
    .fresh(fresh[0]),
    .high(high[0]),
    .level(level0),
    .probe(probe[0]),
    .probe_clk(probe_clk),
    .rst_n(rst_n)
  );
  gauge_channel gauge1 (
    .calibrate(calibrate),
    .calibration(calibration),
    .clk(quiet_clk),
    .fresh(fresh[1]),
    .high(high[1]),
    .level(level1),
    .probe(probe[1]),
    .probe_clk(probe_clk),
    .rst_n(rst_n)
  );
  gauge_channel gauge2 (
    .calibrate(calibrate),
    .calibration(calibration),
    .clk(quiet_clk),
    .fresh(fresh[2]),
    .high(high[2]),
    .level(level2),
    .probe(probe[2]),
    .probe_clk(probe_clk),
    .rst_n(rst_n)
  );
  gauge_channel gauge3 (
    .calibrate(calibrate),
    .calibration(calibration),
    .clk(quiet_clk),
    .fresh(fresh[3]),
    .high(high[3]),
    .level(level3),
    .probe(probe[3]),
    .probe_clk(probe_clk),
    .rst_n(rst_n)
  );
  phase_guard guard (
    .level(level[7:0]),
    .phase_1(phase_1),
    .phase_2(phase_2),
    .safe(safe)
  );
  tide_log log (
    .address(log_address),
    .clk(clk),
    .found(logged),
    .value({ channel, sum }),
    .write(_002_)
  );
  shore_sender sender (
    .alarm(alarm),
    .beacon(beacon),
    .clk(slow_clk),
    .level(level[11:4]),
    .rst_n(clear_n),
    .serial_out(serial_out)
  );
  sluice_control sluice (
    .alarm(alarm),
    .clk(clk),
    .gate_close(gate_close),
    .gate_open(gate_open),
    .high(high),
    .level(level),
    .limit(sluice_limit),
    .rst_n(rst_n)
  );
endmodule
